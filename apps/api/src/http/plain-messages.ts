import { z } from 'zod';

/** Replaces the wording for a field that is absent, which speaks of types, by what a person needs to know. */
export function usePlainMessages(): void {
  z.config({
    customError: (issue) =>
      issue.code === 'invalid_type' && issue.input === undefined ? 'This is missing' : undefined,
  });
}
