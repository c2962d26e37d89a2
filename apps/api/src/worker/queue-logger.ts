import { Logger as NestLogger } from '@nestjs/common';
import { Logger } from 'graphile-worker';

const logger = new NestLogger('Queue');

/** Passes the queue's words on to the log of the process. */
export const queueLogger = new Logger(() => (level: string, message, meta) => {
  // A failed job has its own entry, with what is done about it.
  if (level === 'error' && meta?.failure !== true) logger.error(meta ?? {}, message);
  else if (level === 'warning') logger.warn(meta ?? {}, message);
  else logger.debug(meta ?? {}, message);
});
