import type { Spur, TonePowers } from './tone-result.js';

/** Samples of the longest stretch that is analysed as a whole: 2^20, one transform of some ten megabytes. */
export const longestToneStretch = 2 ** 20;

/** Lines of the stretch within which two spurs are the same one. */
const SAME_LINES = 1.5;

/**
 * Mean powers of several stretches of one record, weighted by their samples. A spur counts in every stretch: where it is
 * not among the largest lines of a stretch, it is taken as strong as the smallest of those, the most it can be.
 */
export function combineTonePowers(stretches: readonly TonePowers[]): TonePowers {
  const [first] = stretches;
  if (first === undefined) throw new RangeError('There is no stretch to combine');
  if (stretches.length === 1) return first;
  const sampleCount = stretches.reduce((sum, s) => sum + s.sampleCount, 0);
  const mean = (value: (s: TonePowers) => number) =>
    stretches.reduce((sum, s) => sum + s.sampleCount * value(s), 0) / sampleCount;
  const withBand = stretches.every((s) => s.bandNoiseAndDistortion !== null);
  return {
    sampleCount,
    sampleRateHz: first.sampleRateHz,
    frequencyHz: mean((s) => s.frequencyHz),
    dc: mean((s) => s.dc),
    tone: mean((s) => s.tone),
    harmonics: first.harmonics.map((_, i) => meanHarmonic(stretches, i)),
    noiseAndDistortion: mean((s) => s.noiseAndDistortion),
    noise: mean((s) => s.noise),
    bandNoiseAndDistortion: withBand ? mean((s) => s.bandNoiseAndDistortion!) : null,
    noiseDensitySquared: mean((s) => s.noiseDensitySquared),
    spurs: meanSpurs(stretches, mean),
  };
}

/** Of the stretches in which the order has a line of its own. */
function meanHarmonic(stretches: readonly TonePowers[], index: number): Spur | null {
  let samples = 0;
  let power = 0;
  let frequencyHz = 0;
  for (const { harmonics, sampleCount } of stretches) {
    const line = harmonics[index];
    if (!line) continue;
    samples += sampleCount;
    power += sampleCount * line.power;
    frequencyHz += sampleCount * line.frequencyHz;
  }
  return samples > 0 ? { frequencyHz: frequencyHz / samples, power: power / samples } : null;
}

function meanSpurs(
  stretches: readonly TonePowers[],
  mean: (value: (s: TonePowers) => number) => number,
): Spur[] {
  const kept = stretches[0]!.spurs.length;
  const candidates = stretches.flatMap((s) => s.spurs).sort((a, b) => b.power - a.power);
  const found: Spur[] = [];
  for (const { frequencyHz } of candidates) {
    if (found.length >= kept) break;
    const near = (spur: Spur, s: TonePowers) =>
      Math.abs(spur.frequencyHz - frequencyHz) * s.sampleCount <= SAME_LINES * s.sampleRateHz;
    if (found.some((spur) => near(spur, stretches[0]!))) continue;
    const power = mean((s) => s.spurs.find((spur) => near(spur, s))?.power ?? s.spurs.at(-1)?.power ?? 0);
    found.push({ frequencyHz, power });
  }
  return found.sort((a, b) => b.power - a.power);
}
