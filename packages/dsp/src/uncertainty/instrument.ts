import type { ChannelAccuracy } from '../types.js';
import type { Contribution } from './combine.js';

/** What is known of the gain of a channel. */
export type GainAccuracy = Pick<ChannelAccuracy, 'readingPercent' | 'calibrationPercent'>;

/**
 * What the gain of the measuring chain brings to a reading: the calibration, stated as expanded uncertainty with k = 2
 * (JCGM 100:2008, 4.3.3), and the limits of the instrument's accuracy, within which any value is as likely as another
 * (rectangular distribution, 4.3.7: half-width/√3). Both are in percent of reading; an offset is not part of them.
 */
export function gainContributions(value: number, accuracy: GainAccuracy | null): Contribution[] {
  if (accuracy === null) return [];
  const perPercent = Math.abs(value) / 100;
  return [
    { source: 'calibration', standard: (accuracy.calibrationPercent / 2) * perPercent },
    { source: 'accuracy', standard: (accuracy.readingPercent / Math.sqrt(3)) * perPercent },
  ];
}

/**
 * Standard deviation of the error of a single sample of an ideal quantiser, step/√12 (W. R. Bennett, Bell System
 * Technical Journal 27, 1948; B. Widrow and I. Kollár, "Quantization Noise", 2008; IEEE 1241 takes it for the ideal
 * converter). Where the errors of N samples are independent, a figure that rests on them has step/√(12 N), see
 * `whiteNoiseOfFigure`.
 */
export function quantisationDeviation(step: number): number {
  return step / Math.sqrt(12);
}

/**
 * Standard uncertainty that white noise of the samples brings to a mean, to a total rms and to the rms of a line, all
 * alike: deviation/√N. Mean: JCGM 100:2008, 4.2.3. Line: the Cramér-Rao bound of an amplitude is √(2/N) times the
 * deviation (S. M. Kay, "Fundamentals of Statistical Signal Processing", vol. 1, 3.11), that of its rms value 1/√2 of it.
 * Total rms R: the noise n changes R² by 2·mean(x n), whose deviation is 2 R/√N times that of n.
 */
export function whiteNoiseOfFigure(deviation: number, sampleCount: number): number {
  return deviation / Math.sqrt(sampleCount);
}
