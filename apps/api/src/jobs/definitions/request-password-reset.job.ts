import { z } from 'zod';
import { defineJob } from '../job-definition.js';

/** Looks whether an e-mail address has an account, and sends it a link with which a new password can be set. */
export const requestPasswordResetJob = defineJob({
  name: 'request-password-reset',
  payload: z.object({ email: z.string() }),
  maxAttempts: 5,
  key: ({ email }) => `request-password-reset:${email}`,
});
