import type { TonePowers } from '../tone/tone-result.js';
import type { Uncertainty } from '../types.js';
import { combineUncertainty } from './combine.js';

const DB_PER_NEPER = 10 / Math.LN10;
const DB_PER_BIT = 20 * Math.log10(2);
/** A line of noise exceeds this many times its mean power with probability e^−25. */
const SIGNIFICANCE = 25;

/**
 * Expanded uncertainties (k = 2) of the single-tone figures from the noise of the record, by the name of the figure.
 *
 * With noise of power S (everything but tone, harmonics and DC), harmonics of power D² and a tone of power P over N
 * samples, in white Gaussian noise: var S = 2 S²/N, var D² = 4 D² S/N, var P = 4 P S/N (variance of a variance and of a
 * line's power; S. M. Kay, "Fundamentals of Statistical Signal Processing", vol. 1, 3.11), uncorrelated. All figures are
 * ratios, so the gain of the instrument cancels; its own distortion and jitter are part of what is measured, and
 * quantisation is part of the noise. For the largest spur there is an estimate only when it is a line of the signal,
 * 25 times above the mean noise line: the largest line of noise follows no such law.
 */
export function toneUncertainty(powers: TonePowers): Record<string, Uncertainty> {
  const { tone, noiseAndDistortion, noise, sampleCount, harmonics, spurs } = powers;
  const distortion = harmonics.reduce((sum, line) => sum + (line?.power ?? 0), 0);
  if (!(noise > 0 && tone > 0)) return {};
  const ofTone = (4 * noise) / (sampleCount * tone);
  const ofAll = (2 * noise ** 2 + 4 * distortion * noise) / (sampleCount * noiseAndDistortion ** 2);
  const sinadDb = DB_PER_NEPER * Math.sqrt(ofAll + ofTone);
  const ratio = Math.sqrt(noiseAndDistortion / (tone + noiseAndDistortion));
  const share = tone / (tone + noiseAndDistortion);
  const spur = Math.max(0, ...harmonics.map((line) => line?.power ?? 0), ...spurs.map(({ power }) => power));
  const ofSpur = spur > (SIGNIFICANCE * 2 * noise) / sampleCount ? (4 * noise) / (sampleCount * spur) : null;
  const standards: Record<string, number | null> = {
    sinadDb,
    snrDb: DB_PER_NEPER * Math.sqrt(2 / sampleCount + ofTone),
    enobBits: sinadDb / DB_PER_BIT,
    thdPlusNPercent: 50 * ratio * share * Math.sqrt(ofAll + ofTone),
    sfdrDb: ofSpur === null ? null : DB_PER_NEPER * Math.sqrt(ofSpur + ofTone),
  };
  const out: Record<string, Uncertainty> = {};
  for (const [name, standard] of Object.entries(standards)) {
    const uncertainty = standard === null ? null : combineUncertainty([{ source: 'noise', standard }]);
    if (uncertainty !== null) out[name] = uncertainty;
  }
  return out;
}
