import type { ReadProblem } from '@overtally/contracts';
import type { JobDefinition } from './job-definition.js';

export interface JobContext {
  /** Aborts when the worker is told to stop; the job is then tried again later. */
  readonly signal: AbortSignal;
}

/**
 * Does the jobs of one definition. `run` may be called again for the same payload, also after a crash half way,
 * and must then come to the same end. It throws only when its surroundings fail; bad input is a result.
 */
export interface JobHandler<Payload> {
  readonly definition: JobDefinition<Payload>;
  run(payload: Payload, context: JobContext): Promise<void>;
  /** Records that the job will never be done, so that nothing waits for it. */
  giveUp(payload: Payload, problem: ReadProblem): Promise<void>;
}
