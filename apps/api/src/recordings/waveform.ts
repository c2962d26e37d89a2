import { coarser, pyramidLevels, type PyramidLevel } from './reading/pyramid.js';

/** Which stored values answer a request for a part of a waveform. Counts and indices are in samples. */
export type WaveformPlan =
  | { kind: 'samples'; first: number; end: number }
  | {
      kind: 'envelope';
      first: number;
      end: number;
      /** Samples in each bin; the last bin may hold fewer. */
      binSamples: number;
      /** Level of the pyramid to read, null: the samples themselves. */
      level: PyramidLevel | null;
      /** Values of the source (bins of the level, or samples) joined into one bin. */
      ratio: number;
    };

/**
 * Plans the answer for samples `first` up to but not including `end` in at most `points` points: the samples when
 * they are few enough, else bins of equal length whose edges are those of the finest level that is fine enough.
 */
export function planWaveform(sampleCount: number, first: number, end: number, points: number): WaveformPlan {
  if (end - first <= points) return { kind: 'samples', first, end };
  const wanted = Math.ceil((end - first) / points);
  const level = pyramidLevels(sampleCount).findLast(({ factor }) => factor <= wanted) ?? null;
  const factor = level?.factor ?? 1;
  const alignedFirst = Math.floor(first / factor) * factor;
  let ratio = Math.ceil(wanted / factor);
  while (Math.ceil((end - alignedFirst) / (ratio * factor)) > points) ratio += 1;
  return { kind: 'envelope', first: alignedFirst, end, binSamples: ratio * factor, level, ratio };
}

/** Pairs minimum, maximum of `samples` in bins of `ratio`; missing samples count for nothing. */
export function envelopeOf(samples: Float64Array, ratio: number): Float64Array {
  const pairs = new Float64Array(samples.length * 2);
  for (let i = 0; i < samples.length; i += 1) pairs[2 * i] = pairs[2 * i + 1] = samples[i]!;
  return coarser(pairs, ratio);
}
