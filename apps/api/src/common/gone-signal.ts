import type { Response } from 'express';
import { problem } from './problem.js';

/** Fires when who asked goes away before the answer. */
export function goneSignal(reply: Response): AbortSignal {
  const controller = new AbortController();
  reply.once('close', () => {
    if (!reply.writableEnded)
      controller.abort(problem(400, 'broken-off', 'The connection was closed before the answer'));
  });
  return controller.signal;
}
