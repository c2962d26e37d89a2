import { createRealFftPlan } from '../fft/real-fft-plan.js';
import { findPeaks } from '../peaks/find-peaks.js';
import { harmonicCombs, type CombRange, type HarmonicComb, type PeakPlace } from '../peaks/harmonic-comb.js';
import { harmonicFamilies } from '../peaks/harmonic-families.js';
import { noiseFloor } from '../peaks/noise-floor.js';
import { windowGains } from '../windows/window-gains.js';
import { windowSamples } from '../windows/window-samples.js';
import { windowTransform } from '../windows/window-transform.js';

/** Samples in the middle of a record that are looked at. */
const MAX_LENGTH = 2 ** 18;
const MOST_PEAKS = 40;
/** −50 dB: weaker peaks beside the largest are not asked. */
const SMALLEST_SHARE = 1e-5;
/** Series looked for among the peaks, each among those that the earlier ones left over. */
const MOST_FAMILIES = 6;
/** A series with less of the power than this is not what the record is about: hum beside a tone, say. */
const LEAST_SHARE = 0.02;
/** A line with more of the power than this is what the record is about. */
const DOMINANT_SHARE = 0.9;
/** Nats that a factor e of the share of power is worth beside the evidence of the places. */
const SHARE_WEIGHT = 3;
/** A line at a known place exceeds the noise there this many times with probability e^−9. */
const KNOWN_PLACE = 9;

export interface FundamentalCandidate {
  frequencyHz: number;
  uncertaintyHz: number;
  /** Root mean square of the orders that were met, weighted by their power. */
  typicalOrder: number;
  /** Whether the fundamental itself stands out of the noise around it. */
  standsOut: boolean;
}

/**
 * The fundamental that the peaks of the spectrum suggest: they are taken apart into harmonic series and single lines, and
 * the series with good evidence that also holds much of the power is taken. Neither strong lines that belong to nothing
 * nor a dense comb that meets them by chance mislead it, nor does it matter whether the fundamental itself is strong.
 *
 * @param samples with their mean taken away
 * @param hinted looks only at series whose fundamental lies between `lowHz` and `highHz`, whatever else is there
 * @returns null when no peak stands out or none suggests a fundamental between `lowHz` and `highHz`
 */
export function combFundamental(
  samples: Float64Array,
  sampleRateHz: number,
  range: { lowHz: number; highHz: number },
  hinted: boolean,
): FundamentalCandidate | null {
  const spectrum = hannSpectrum(samples, sampleRateHz);
  const peaks = peakPlaces(spectrum);
  const combRange = { ...range, bandHz: sampleRateHz / 2 };
  const standsOut = (comb: HarmonicComb) => comb.orders.includes(1) || exceedsFloor(spectrum, comb);
  const best = hinted
    ? mostWorth(harmonicCombs(peaks, combRange).filter(({ share }) => share > 0))
    : mainSeries(peaks, combRange, standsOut);
  return (
    best && {
      frequencyHz: best.fundamentalHz,
      uncertaintyHz: best.uncertaintyHz,
      typicalOrder: best.typicalOrder,
      standsOut: standsOut(best),
    }
  );
}

/**
 * The series or single line that the record is most about. Where that series has no line at its own fundamental, but one
 * line holds nearly all of the power, it is that line: the lines that rounding gives a small tone lie on many combs.
 */
function mainSeries(
  peaks: readonly PeakPlace[],
  range: CombRange,
  standsOut: (comb: HarmonicComb) => boolean,
): HarmonicComb | null {
  const families = harmonicFamilies(peaks, range, { leastEvidence: 0, most: MOST_FAMILIES });
  const singles = peaks
    .map((_, i) => singleLine(peaks, i))
    .filter(({ fundamentalHz }) => fundamentalHz >= range.lowHz && fundamentalHz <= range.highHz);
  const alone = singles.filter(({ orders }) =>
    families.every((family) => family.orders[orders.indexOf(1)] === 0),
  );
  const main = mostWorth([...families, ...alone].filter(({ share }) => share >= LEAST_SHARE));
  if (main === null || standsOut(main)) return main;
  return singles.find(({ share }) => share > DOMINANT_SHARE) ?? main;
}

function mostWorth(combs: readonly HarmonicComb[]): HarmonicComb | null {
  const worth = ({ evidence, share }: HarmonicComb) => evidence + SHARE_WEIGHT * Math.log(share);
  return combs.reduce<HarmonicComb | null>(
    (best, comb) => (best && worth(best) >= worth(comb) ? best : comb),
    null,
  );
}

function singleLine(peaks: readonly PeakPlace[], index: number): HarmonicComb {
  const { frequencyHz, uncertaintyHz, power } = peaks[index]!;
  const orders = peaks.map((_, i) => (i === index ? 1 : 0));
  const share = power / peaks.reduce((sum, peak) => sum + peak.power, 0);
  return { fundamentalHz: frequencyHz, uncertaintyHz, orders, evidence: 0, share, typicalOrder: 1 };
}

/** The largest even number up to `most` without prime factors above 5, a few per cent below it at the most. */
function quickLength(most: number): number {
  let best = Math.min(2, most);
  for (let threes = 1; 2 * threes <= most; threes *= 3) {
    for (let odd = threes; 2 * odd <= most; odd *= 5) {
      best = Math.max(best, odd * 2 ** Math.floor(Math.log2(most / odd)));
    }
  }
  return best;
}

interface Spectrum {
  lineHz: number;
  power: Float64Array;
  floor: Float64Array;
  enbwLines: number;
}

function hannSpectrum(samples: Float64Array, sampleRateHz: number): Spectrum {
  const length = quickLength(Math.min(samples.length, MAX_LENGTH));
  const start = Math.floor((samples.length - length) / 2);
  const window = windowSamples('hann', length);
  const { coherentGain, enbwBins } = windowGains(window);
  for (let n = 0; n < length; n++) window[n]! *= samples[start + n]!;
  const plan = createRealFftPlan(length);
  const power = new Float64Array(plan.lineCount);
  const im = new Float64Array(plan.lineCount);
  plan.forward(window, power, im);
  const scale = 2 / (coherentGain * length) ** 2;
  for (let k = 0; k < power.length; k++) power[k] = scale * (power[k]! * power[k]! + im[k]! * im[k]!);
  return { lineHz: sampleRateHz / length, power, floor: noiseFloor(power), enbwLines: enbwBins };
}

function peakPlaces({ lineHz, ...spectrum }: Spectrum): PeakPlace[] {
  const peaks = findPeaks({
    ...spectrum,
    ...{ transform: windowTransform('hann'), smallestShare: SMALLEST_SHARE, most: MOST_PEAKS },
  });
  return peaks.map((peak) => ({
    frequencyHz: peak.line * lineHz,
    uncertaintyHz: peak.uncertainty * lineHz,
    power: peak.power,
  }));
}

/** Whether the larger of the two lines beside the fundamental stands out of the noise. */
function exceedsFloor({ lineHz, power, floor }: Spectrum, { fundamentalHz }: HarmonicComb): boolean {
  const k = Math.floor(fundamentalHz / lineHz);
  return Math.max(power[k] ?? 0, power[k + 1] ?? 0) > KNOWN_PLACE * (floor[k] ?? Infinity);
}
