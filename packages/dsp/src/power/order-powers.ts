import { zeroCrossingPhase } from '../harmonics/zero-crossing-phase.js';
import { wrapDegrees } from '../model/fit-sinusoids.js';
import { commonOrders, isAboveNoise } from './phasors.js';
import { activePower, reactivePower } from './power-figures.js';
import type { OrderPower, PhasorSet, PowerDirection } from './types.js';

/** An active power within this many standard deviations of zero has no direction. */
const DIRECTION_DEVIATIONS = 3;
/** Nor has one that is this small a share of V_h I_h: cos 90° is no exact zero in binary. */
const ROUNDING = 1e-9;

/**
 * Active and reactive power of each order with its direction: a load that distorts the current sends power of the higher
 * orders back into the source (IEEE 1459-2010, 3.1.2.3 and 3.1.2.5).
 *
 * Phases and direction are null where the order of either channel is below 0.1 % of the largest order or within ten
 * standard deviations of the noise, the direction also where the power is within three of zero. These limits are common
 * practice, no standard's.
 *
 * @param voltage in V
 * @param current in A, at the same fundamental and zero time
 */
export function orderPowers(voltage: PhasorSet, current: PhasorSet): OrderPower[] {
  return commonOrders(voltage, current).map((order) => {
    const voltageRms = voltage.rms[order - 1]!;
    const currentRms = current.rms[order - 1]!;
    const voltagePhase = voltage.phaseDeg[order - 1]!;
    const currentPhase = current.phaseDeg[order - 1]!;
    const voltageKnown = isAboveNoise(voltage, order);
    const currentKnown = isAboveNoise(current, order);
    const known = voltageKnown && currentKnown;
    const P = activePower(voltage, current, order);
    const fromCrossing = (phase: number) =>
      isAboveNoise(voltage, 1) ? zeroCrossingPhase(order, phase, voltage.phaseDeg[0]!) : null;
    return {
      order,
      voltageRms,
      currentRms,
      phaseDifferenceDeg: known ? wrapDegrees(voltagePhase - currentPhase) : null,
      voltagePhaseZeroCrossingDeg: voltageKnown ? fromCrossing(voltagePhase) : null,
      currentPhaseZeroCrossingDeg: currentKnown ? fromCrossing(currentPhase) : null,
      P,
      Q: reactivePower(voltage, current, order),
      direction: known
        ? direction(P, voltageRms * currentRms, powerDeviation(voltage, current, order))
        : null,
    };
  });
}

/** First-order propagation of the noise of both channels to V_h I_h cos θ_h. */
function powerDeviation(voltage: PhasorSet, current: PhasorSet, order: number): number {
  return Math.hypot(
    current.rms[order - 1]! * (voltage.noiseRms ?? 0),
    voltage.rms[order - 1]! * (current.noiseRms ?? 0),
  );
}

function direction(power: number, apparent: number, deviation: number): PowerDirection | null {
  const limit = Math.max(ROUNDING * apparent, DIRECTION_DEVIATIONS * deviation);
  if (Math.abs(power) <= limit) return null;
  return power > 0 ? 'into-load' : 'from-load';
}
