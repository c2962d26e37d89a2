import type { Problem } from './types.js';

/** Carries a problem of the input from the depth of a reader to its entry point, where it becomes an outcome. */
export class Refusal extends Error {
  constructor(readonly problem: Problem) {
    super(problem.message);
    this.name = 'Refusal';
  }
}

/** Ends reading with a problem. `place` holds the 1-based line and column where they are known. */
export function refuse(
  code: string,
  message: string,
  cure: string,
  place: { line?: number; column?: number } = {},
): never {
  throw new Refusal({ code, message, cure, ...place });
}

/** Runs `work`; a refusal becomes the value of `onRefusal`, every other error passes through. */
export function catchRefusal<T>(work: () => T, onRefusal: (problem: Problem) => T): T {
  try {
    return work();
  } catch (error) {
    if (error instanceof Refusal) return onRefusal(error.problem);
    throw error;
  }
}
