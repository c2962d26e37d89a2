/**
 * rms/mean|x|, DC included, over the whole periods that fit from the first sample (all samples when no period is
 * known). Null for a record of zeros.
 *
 * @param periodSamples length of one period in samples, need not be an integer
 */
export function formFactor(samples: Float64Array, periodSamples: number | null): number | null {
  const count = wholePeriodSamples(samples.length, periodSamples);
  let squares = 0;
  let absolute = 0;
  for (let i = 0; i < count; i++) {
    squares += samples[i]! ** 2;
    absolute += Math.abs(samples[i]!);
  }
  return absolute > 0 ? Math.sqrt(squares / count) / (absolute / count) : null;
}

/** Samples of the whole periods that fit into a record; all samples when no period is known or none fits. */
export function wholePeriodSamples(sampleCount: number, periodSamples: number | null): number {
  const periods = periodSamples === null ? 0 : Math.floor((sampleCount + 0.5) / periodSamples);
  return periods > 0 && periodSamples !== null
    ? Math.min(sampleCount, Math.round(periods * periodSamples))
    : sampleCount;
}
