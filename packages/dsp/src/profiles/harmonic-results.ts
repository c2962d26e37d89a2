import type { FundamentalEstimate } from '../fundamental/find-fundamental.js';
import { zeroCrossingPhase } from '../harmonics/zero-crossing-phase.js';
import type { HarmonicResult } from '../types.js';

/** Orders below this share of the largest one have no phase. */
const PHASE_SHARE = 1e-3;
/** Nor have orders within this many standard deviations of their rms value in the residual. */
const PHASE_DEVIATIONS = 10;

/**
 * The orders of the whole-record least-squares fit as results; the mains profile replaces the rms values by those of its
 * windows.
 *
 * @param steady false leaves out all phases: with a moving frequency they have no meaning over the whole record
 */
export function harmonicResults(
  estimate: FundamentalEstimate,
  sampleCount: number,
  steady: boolean,
): HarmonicResult[] {
  const components = estimate.fit.components;
  const largest = components.reduce((max, c) => Math.max(max, c.rms), 0);
  const noise = (PHASE_DEVIATIONS * estimate.residualRms) / Math.sqrt(sampleCount);
  const fundamental = components[0]!;
  return components.map((component, i) => {
    const order = i + 1;
    const known = steady && component.rms >= Math.max(PHASE_SHARE * largest, noise);
    return {
      order,
      frequencyHz: order * estimate.frequencyHz,
      rms: component.rms,
      percentOfFundamental: (100 * component.rms) / fundamental.rms,
      phaseDeg: known ? component.phaseDeg : null,
      phaseZeroCrossingDeg: known ? zeroCrossingPhase(order, component.phaseDeg, fundamental.phaseDeg) : null,
      groupRms: null,
      subgroupRms: null,
      smoothedMeanRms: null,
      smoothedMaxRms: null,
    };
  });
}
