import { refuse } from './refusal.js';
import type { ReadChannel, ReadWarning } from './types.js';

/** Counts samples that are no numbers, per channel, and knows the first. */
export class MissingTally {
  readonly counts: number[];
  private first: { channel: string; sample: number } | null = null;

  constructor(private readonly channels: ReadChannel[]) {
    this.counts = channels.map(() => 0);
  }

  /** Takes `samples` of a channel, the first of them sample number `from`, counted from 0; what is no finite number becomes NaN. */
  take(index: number, samples: Float64Array, from: number): void {
    const missing = keepFinite(samples);
    if (missing > 0) this.add(index, from + samples.findIndex((value) => Number.isNaN(value)), missing);
  }

  /** Counts `missing` samples of a channel, the first of them sample number `from`. */
  add(index: number, from: number, missing: number): void {
    this.counts[index] = (this.counts[index] as number) + missing;
    this.first ??= { channel: this.channels[index]?.name ?? '', sample: from };
  }

  /** Warning about what was counted, none when there is nothing. */
  warnings(): ReadWarning[] {
    const total = this.counts.reduce((sum, n) => sum + n, 0);
    if (this.first === null || total === 0) return [];
    const { channel, sample } = this.first;
    const place = `sample ${sample + 1} of channel "${channel}"`;
    const message =
      total === 1
        ? `1 sample is not a finite number, ${place}.`
        : `${total} samples are not finite numbers, first ${place}.`;
    return [{ code: 'missing-values', message, count: total, samples: [sample] }];
  }
}

/** Replaces what is no finite number by NaN; returns how many there were. */
function keepFinite(samples: Float64Array): number {
  let missing = 0;
  for (let i = 0; i < samples.length; i += 1) {
    if (Number.isFinite(samples[i])) continue;
    samples[i] = NaN;
    missing += 1;
  }
  return missing;
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
