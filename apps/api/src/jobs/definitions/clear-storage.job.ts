import { z } from 'zod';
import { defineJob } from '../job-definition.js';

/** Removes stored objects that no row refers to. */
export const clearStorageJob = defineJob({
  name: 'clear-storage',
  payload: z.object({}),
  maxAttempts: 3,
  key: () => 'clear-storage',
});
