import type { JobDefinition } from '../job-definition.js';
import { analyseRecordingJob } from './analyse-recording.job.js';
import { calibrationNoticesJob } from './calibration-notices.job.js';
import { clearStorageJob } from './clear-storage.job.js';
import { readRecordingJob } from './read-recording.job.js';
import { requestPasswordResetJob } from './request-password-reset.job.js';
import { sendMailJob } from './send-mail.job.js';

/** Every kind of job; the worker refuses to start when one of them has no handler. */
export const jobDefinitions: readonly Pick<JobDefinition, 'name'>[] = [
  readRecordingJob,
  analyseRecordingJob,
  clearStorageJob,
  sendMailJob,
  requestPasswordResetJob,
  calibrationNoticesJob,
];
