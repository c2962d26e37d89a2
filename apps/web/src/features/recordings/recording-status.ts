import type { ReadProblem, Recording, RecordingStatus } from '@overtally/contracts';

/** True while the recording waits for the worker or is being worked on. */
export const isBusy = (recording: Pick<Recording, 'status'>): boolean =>
  recording.status === 'received' || recording.status === 'reading' || recording.status === 'analysing';

/** True for a problem that is none: somebody called the reading or the analysis off. */
export const isCancelled = ({ code }: ReadProblem): boolean =>
  code === 'cancelled' || code === 'reading-cancelled';

export const statusWords: Record<RecordingStatus, string> = {
  received: 'waiting to be read',
  reading: 'reading',
  analysing: 'analysing',
  ready: 'ready',
  failed: 'not readable',
};
