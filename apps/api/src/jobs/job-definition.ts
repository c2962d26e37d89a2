import type { z } from 'zod';

/** A kind of job: rooms hand work to each other by its definition, without importing each other. */
export interface JobDefinition<Payload = unknown> {
  readonly name: string;
  readonly payload: z.ZodType<Payload>;
  /** Attempts before the job is given up; only failures of the surroundings are tried again. */
  readonly maxAttempts: number;
  /** Two jobs of one key that wait at the same time become one. */
  readonly key: (payload: Payload) => string;
}

/** Gives a definition its payload type from the schema. */
export function defineJob<Payload>(definition: JobDefinition<Payload>): JobDefinition<Payload> {
  return definition;
}
