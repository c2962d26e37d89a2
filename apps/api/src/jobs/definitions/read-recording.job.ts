import { z } from 'zod';
import { defineJob } from '../job-definition.js';

/** Reads the source file of a recording into samples. `readId` names the output, so that a repeat overwrites it. */
export const readRecordingJob = defineJob({
  name: 'read-recording',
  payload: z.object({ recordingId: z.uuid(), readId: z.uuid() }),
  maxAttempts: 3,
  key: ({ recordingId }) => `read-recording:${recordingId}`,
});
