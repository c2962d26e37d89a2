import { createRealFftPlan } from '../fft/real-fft-plan.js';
import { findPeaks } from '../peaks/find-peaks.js';
import { harmonicCombs, type HarmonicComb, type PeakPlace } from '../peaks/harmonic-comb.js';
import { noiseFloor } from '../peaks/noise-floor.js';
import { windowGains } from '../windows/window-gains.js';
import { windowSamples } from '../windows/window-samples.js';
import { windowTransform } from '../windows/window-transform.js';

/** Samples in the middle of a record that are looked at. */
const MAX_LENGTH = 2 ** 18;
const MOST_PEAKS = 40;
/** −50 dB: weaker peaks beside the largest are not asked. */
const SMALLEST_SHARE = 1e-5;
/** Nats that a factor e of the share of power is worth beside the evidence of the places. */
const SHARE_WEIGHT = 8;

export interface FundamentalCandidate {
  frequencyHz: number;
  uncertaintyHz: number;
  /** Root mean square of the orders that were met, weighted by their power. */
  typicalOrder: number;
}

/**
 * The fundamental that the peaks of the spectrum suggest: of all combs the one with the best evidence that also holds much
 * of the power. Neither strong lines that belong to nothing nor a dense comb that meets them by chance mislead it, nor
 * does it matter whether the fundamental itself is strong.
 *
 * @param samples with their mean taken away
 * @returns null when no peak stands out or none suggests a fundamental between `lowHz` and `highHz`
 */
export function combFundamental(
  samples: Float64Array,
  sampleRateHz: number,
  { lowHz, highHz }: { lowHz: number; highHz: number },
): FundamentalCandidate | null {
  const peaks = peakPlaces(samples, sampleRateHz);
  const combs = harmonicCombs(peaks, { lowHz, highHz, bandHz: sampleRateHz / 2 });
  const worth = (comb: HarmonicComb) => comb.evidence + SHARE_WEIGHT * Math.log(comb.share);
  const [first, ...others] = combs.filter((comb) => comb.share > 0);
  if (!first) return null;
  const best = others.reduce((a, b) => (worth(b) > worth(a) ? b : a), first);
  return {
    frequencyHz: best.fundamentalHz,
    uncertaintyHz: best.uncertaintyHz,
    typicalOrder: typicalOrder(best.orders, peaks),
  };
}

function peakPlaces(samples: Float64Array, sampleRateHz: number): PeakPlace[] {
  const length = Math.min(samples.length, MAX_LENGTH);
  const start = Math.floor((samples.length - length) / 2);
  const window = windowSamples('hann', length);
  const { coherentGain, enbwBins } = windowGains(window);
  const windowed = window.map((w, n) => w * samples[start + n]!);
  const plan = createRealFftPlan(length);
  const re = new Float64Array(plan.lineCount);
  const im = new Float64Array(plan.lineCount);
  plan.forward(windowed, re, im);
  const scale = 2 / (coherentGain * length) ** 2;
  const power = re.map((value, k) => scale * (value * value + im[k]! * im[k]!));
  const peaks = findPeaks({
    ...{ power, floor: noiseFloor(power), transform: windowTransform('hann'), enbwLines: enbwBins },
    ...{ smallestShare: SMALLEST_SHARE, most: MOST_PEAKS },
  });
  const lineHz = sampleRateHz / length;
  return peaks.map((peak) => ({
    frequencyHz: peak.line * lineHz,
    uncertaintyHz: peak.uncertainty * lineHz,
    power: peak.power,
  }));
}

function typicalOrder(orders: readonly number[], peaks: readonly PeakPlace[]): number {
  let weighted = 0;
  let total = 0;
  orders.forEach((order, i) => {
    if (order === 0) return;
    weighted += order * order * peaks[i]!.power;
    total += peaks[i]!.power;
  });
  return Math.sqrt(weighted / total);
}
