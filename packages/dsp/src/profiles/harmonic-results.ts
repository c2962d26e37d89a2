import { zeroCrossingPhase } from '../harmonics/zero-crossing-phase.js';
import type { OrderSet } from '../stages/order-set.js';
import type { HarmonicResult } from '../types.js';

/** Orders below this share of the largest one have no phase. */
const PHASE_SHARE = 1e-3;
/** Nor have orders within this many standard deviations of their rms value in the residual. */
const PHASE_DEVIATIONS = 10;

export interface HarmonicOptions {
  /** false leaves out all phases: with a moving frequency they have no meaning over the whole record. */
  steady: boolean;
  /** false when the channel has no fundamental of its own to relate to. */
  periodic: boolean;
}

/** The orders over the whole record as results; the mains profile puts in the figures of its windows. */
export function harmonicResults(orders: OrderSet, { steady, periodic }: HarmonicOptions): HarmonicResult[] {
  const { rms, phaseDeg, frequencyHz, noiseRms } = orders;
  const largest = rms.reduce((max, x) => Math.max(max, x), 0);
  const lowest = Math.max(PHASE_SHARE * largest, PHASE_DEVIATIONS * noiseRms);
  return Array.from(rms, (value, i): HarmonicResult => {
    const order = i + 1;
    const known = steady && value >= lowest;
    return {
      order,
      frequencyHz: order * frequencyHz,
      rms: value,
      percentOfFundamental: periodic ? (100 * value) / rms[0]! : null,
      phaseDeg: known ? phaseDeg[i]! : null,
      phaseZeroCrossingDeg: known && periodic ? zeroCrossingPhase(order, phaseDeg[i]!, phaseDeg[0]!) : null,
      groupRms: null,
      subgroupRms: null,
      smoothedMeanRms: null,
      smoothedMaxRms: null,
      uncertainty: null,
      groupStatistics: null,
      subgroupStatistics: null,
    };
  });
}
