import { importOptionsSchema } from '@overtally/contracts';
import { z } from 'zod';
import { defineJob } from '../job-definition.js';

/**
 * Reads the source file of a recording into samples. `readId` names the output, so that a repeat overwrites it; the
 * options, and the reading rule they come from, become those of the recording once the reading has succeeded, the analysis is that of who asked for it.
 */
export const readRecordingJob = defineJob({
  name: 'read-recording',
  payload: z.object({
    recordingId: z.uuid(),
    readId: z.uuid(),
    options: importOptionsSchema,
    readingRule: z.object({ id: z.uuid(), name: z.string() }).nullable().default(null),
    requestedById: z.uuid(),
  }),
  maxAttempts: 3,
  key: ({ recordingId }) => `read-recording:${recordingId}`,
});
