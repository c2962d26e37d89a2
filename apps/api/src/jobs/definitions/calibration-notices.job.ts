import { z } from 'zod';
import { defineJob } from '../job-definition.js';

/** Tells people of calibrations that end soon. */
export const calibrationNoticesJob = defineJob({
  name: 'calibration-notices',
  payload: z.object({}),
  maxAttempts: 5,
  key: () => 'calibration-notices',
});
