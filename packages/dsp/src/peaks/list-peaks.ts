import type { SpectrumResult } from '../types.js';
import { windowTransform } from '../windows/window-transform.js';
import { findPeaks } from './find-peaks.js';
import type { HarmonicComb, PeakPlace } from './harmonic-comb.js';
import { harmonicFamilies } from './harmonic-families.js';
import { noiseFloor } from './noise-floor.js';
import type { HarmonicFamily, SpectralLine } from './types.js';

export interface PeakListOptions {
  /** Shape of the Kaiser window the spectrum was made with. */
  kaiserBeta?: number | undefined;
  /** At most this many lines, default 40. */
  most?: number | undefined;
}

export interface PeakList {
  /** Largest first. */
  lines: SpectralLine[];
  /** Harmonic series among the lines, the one with the most power first. */
  families: HarmonicFamily[];
}

const MOST_LINES = 40;
/** −100 dB: the rounding of common sample formats makes smaller lines of its own. */
const SMALLEST_SHARE = 1e-10;
/** Odds of about 1 to 150 against a series that is there by chance. */
const LEAST_EVIDENCE = 5;
const MOST_FAMILIES = 6;
/** Lines of the spectrum below which a fundamental cannot be told from DC. */
const LOWEST_LINE = 2;

/**
 * The largest lines of a spectrum and the harmonic series among them. A line is a local maximum that stands out of the
 * noise floor (medians over blocks of lines) and of the side lobes of larger ones; its frequency and rms value are
 * interpolated by the interpolated DFT of T. Grandke (1983) for the window of the spectrum. A series is proposed where
 * lines lie on the multiples of a fundamental more often than chance would bring (minimum description length).
 */
export function listPeaks(
  spectrum: SpectrumResult,
  { kaiserBeta, most = MOST_LINES }: PeakListOptions = {},
): PeakList {
  const { stepHz, window, segments, noiseBandwidthHz } = spectrum;
  const power = spectrum.rms.map((rms) => rms * rms);
  const peaks = findPeaks({
    ...{ power, floor: noiseFloor(power, segments), averages: segments },
    ...{ transform: windowTransform(window, kaiserBeta), enbwLines: noiseBandwidthHz / stepHz },
    ...{ smallestShare: SMALLEST_SHARE, most },
  });
  const places = peaks.map((peak): PeakPlace => ({
    frequencyHz: peak.line * stepHz,
    uncertaintyHz: peak.uncertainty * stepHz,
    power: peak.power,
  }));
  const bandHz = (power.length - 1) * stepHz;
  const range = { lowHz: LOWEST_LINE * stepHz, highHz: bandHz, bandHz };
  const combs = harmonicFamilies(places, range, { leastEvidence: LEAST_EVIDENCE, most: MOST_FAMILIES });
  combs.sort((a, b) => b.share - a.share);
  return {
    lines: places.map((place, i) => describeLine(place, i, combs)),
    families: combs.map(describeFamily),
  };
}

function describeLine(
  { frequencyHz, power }: PeakPlace,
  index: number,
  combs: readonly HarmonicComb[],
): SpectralLine {
  const family = combs.findIndex(({ orders }) => orders[index]! > 0);
  return {
    frequencyHz,
    rms: Math.sqrt(power),
    familyIndex: family < 0 ? null : family,
    order: combs[family]?.orders[index] ?? null,
  };
}

function describeFamily({ fundamentalHz, orders, share }: HarmonicComb): HarmonicFamily {
  return {
    fundamentalHz,
    orders: orders.filter((order) => order > 0).sort((a, b) => a - b),
    shareOfPower: share,
  };
}
