import type { ComputeOutcome, PlainError } from './compute-request.js';

/** An error as data. */
export function toPlainError(error: unknown): PlainError {
  if (!(error instanceof Error)) return { name: 'Error', message: String(error) };
  const { name, message, stack } = error;
  return { name, message, stack };
}

/** The result of a computation; its error is thrown, with the name that it had. */
export function resultOf(outcome: ComputeOutcome): unknown {
  if (outcome.ok) return outcome.result;
  const { name, message, stack } = outcome.error;
  const error = new Error(message);
  error.name = name;
  if (stack !== undefined) error.stack = stack;
  throw error;
}
