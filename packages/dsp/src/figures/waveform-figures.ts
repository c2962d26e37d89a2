export interface WaveformFigures {
  /** Arithmetic mean of all samples. */
  mean: number;
  /** √(mean of squares) over all samples, DC included. */
  rms: number;
  /** Largest absolute sample. */
  peak: number;
  lowest: number;
  highest: number;
}

/** Plain figures over all samples; no interpolation between samples. */
export function waveformFigures(samples: Float64Array): WaveformFigures {
  let sum = 0;
  let lowest = Infinity;
  let highest = -Infinity;
  for (const x of samples) {
    sum += x;
    if (x < lowest) lowest = x;
    if (x > highest) highest = x;
  }
  const mean = sum / samples.length;
  let squares = 0;
  for (const x of samples) squares += (x - mean) ** 2;
  const rms = Math.sqrt(squares / samples.length + mean * mean);
  return { mean, rms, peak: Math.max(Math.abs(lowest), Math.abs(highest)), lowest, highest };
}
