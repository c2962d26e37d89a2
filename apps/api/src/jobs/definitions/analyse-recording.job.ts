import { z } from 'zod';
import { defineJob } from '../job-definition.js';

/** Computes one analysis of a recording that was read. */
export const analyseRecordingJob = defineJob({
  name: 'analyse-recording',
  payload: z.object({ analysisId: z.uuid() }),
  maxAttempts: 3,
  key: ({ analysisId }) => `analyse-recording:${analysisId}`,
});
