import { refuse } from './refusal.js';
import type { ReadWarning } from './types.js';

/** Replaces what is no finite number by NaN; returns how many there were. */
export function keepFinite(samples: Float64Array): number {
  let missing = 0;
  for (let i = 0; i < samples.length; i += 1) {
    if (Number.isFinite(samples[i])) continue;
    samples[i] = NaN;
    missing += 1;
  }
  return missing;
}

/** Warning about samples that are no numbers, none when there are none. `missing`: how many per channel. */
export function missingWarning(missing: number[]): ReadWarning[] {
  const total = missing.reduce((sum, n) => sum + n, 0);
  if (total === 0) return [];
  const message =
    total === 1
      ? '1 sample is not a finite number; it is kept as missing, not as zero.'
      : `${total} samples are not finite numbers; they are kept as missing, not as zero.`;
  return [{ code: 'missing-values', message, count: total }];
}

/** Refuses a record of fewer than two samples. `what` begins the sentence, such as "The .npy file". */
export function requireFrames(frames: number, what: string): void {
  if (frames >= 2) return;
  refuse(
    frames === 0 ? 'no-samples' : 'too-few-samples',
    frames === 0
      ? `${what} is empty: there are no samples in it.`
      : `${what} holds one sample per channel only; at least two are needed.`,
    'Check that the recording was stopped properly, then copy the file again.',
  );
}
