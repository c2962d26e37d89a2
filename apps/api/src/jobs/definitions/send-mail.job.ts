import { z } from 'zod';
import { defineJob } from '../job-definition.js';

/**
 * Sends one message of the outbox. The queue waits e^n seconds after attempt n, 6.1 h at most, so that the last of these
 * attempts comes about two days after the first.
 */
export const sendMailJob = defineJob({
  name: 'send-mail',
  payload: z.object({ mailId: z.uuid() }),
  maxAttempts: 17,
  key: ({ mailId }) => `send-mail:${mailId}`,
});
