import { Logger } from '@nestjs/common';
import type { ReadProblem } from '@overtally/contracts';
import type { JobHelpers, Task } from 'graphile-worker';
import { isMissingObject } from '../storage/missing-object.js';
import type { AnyHandler } from './match-handlers.js';

/** What the person who waits for a job sees when it is given up for reasons that are not theirs. */
export const gaveUpProblem: ReadProblem = {
  code: 'internal-error',
  message: 'The computation failed for a reason that lies in this installation, not in the file.',
  cure: 'Try once more; if it fails again, give the time and the recording number to the administrator.',
};

const fileMissingProblem: ReadProblem = {
  code: 'stored-file-missing',
  message: 'A file of this recording is missing in the storage of this installation.',
  cure: 'Have it restored from the backup, then read the recording again.',
};

/**
 * The queue's task for a handler. A failure of the surroundings is passed on, so that the queue tries again; the last
 * failure, or an error in the program itself, which would only repeat, gives the job up.
 */
export function taskFor(handler: AnyHandler, shutdown: AbortSignal): Task {
  const logger = new Logger('Worker');
  return async (body: unknown, { job }: Pick<JobHelpers, 'job'>) => {
    const payload: unknown = handler.definition.payload.parse(body);
    try {
      await handler.run(payload, { signal: shutdown });
    } catch (error) {
      if (shutdown.aborted) throw error;
      const place = { job: handler.definition.name, jobId: job.id, attempt: job.attempts };
      if (job.attempts < job.max_attempts && !isProgramError(error)) {
        logger.warn({ ...place, err: error }, 'A job failed and will be tried again');
        throw error;
      }
      logger.error({ ...place, err: error }, 'A job failed and was given up');
      await handler.giveUp(payload, isMissingObject(error) ? fileMissingProblem : gaveUpProblem);
    }
  };
}

/** By name, since an error from a thread keeps its name but not always its class. */
function isProgramError(error: unknown): boolean {
  return (
    error instanceof Error &&
    ['TypeError', 'RangeError', 'ReferenceError', 'SyntaxError', 'DataCloneError'].includes(error.name)
  );
}
