import { Logger as NestLogger } from '@nestjs/common';
import { Logger } from 'graphile-worker';

const logger = new NestLogger('Queue');

/** Passes the queue's words on to the log of the process. */
export const queueLogger = new Logger(() => (level, message, meta) => {
  switch (level) {
    case 'error':
      return logger.error(meta ?? {}, message);
    case 'warning':
      return logger.warn(meta ?? {}, message);
    default:
      return logger.debug(meta ?? {}, message);
  }
});
