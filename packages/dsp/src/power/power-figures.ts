import { commonOrders } from './phasors.js';
import { ratio, rootOfDifference } from './root-of-difference.js';
import type { PhasorSet, PowerFigures } from './types.js';

/**
 * Power quantities of one phase under non-sinusoidal conditions, IEEE 1459-2010, 3.1.2.
 *
 * P = V0 I0 + Σ V_h I_h cos θ_h over the orders that both channels hold, θ_h = angle of V_h − angle of I_h; power that flows
 * at frequencies between the orders is not in it.
 *
 * @param voltage in V
 * @param current in A, at the same fundamental and zero time
 * @throws RangeError when a set holds no order 1
 */
export function powerFigures(voltage: PhasorSet, current: PhasorSet): PowerFigures {
  if (voltage.rms.length === 0 || current.rms.length === 0) {
    throw new RangeError('Power quantities need the fundamental of voltage and current.');
  }
  const { totalRms: V } = voltage;
  const { totalRms: I } = current;
  const V1 = voltage.rms[0]!;
  const I1 = current.rms[0]!;
  const VH = rootOfDifference(V, V1, V);
  const IH = rootOfDifference(I, I1, I);
  const [P1, ...higher] = commonOrders(voltage, current).map((order) => activePower(voltage, current, order));
  const PH = higher.reduce((sum, power) => sum + power, voltage.dc * current.dc);
  const P = P1! + PH;
  const S = V * I;
  const S1 = V1 * I1;
  const DI = IH === null ? null : V1 * IH;
  const DV = VH === null ? null : VH * I1;
  const SH = VH === null || IH === null ? null : VH * IH;
  const SN = DI === null || DV === null || SH === null ? null : Math.hypot(DI, DV, SH);
  return {
    ...{ V, I, V1, I1, VH, IH },
    ...{ P, P1: P1!, PH },
    Q1: reactivePower(voltage, current, 1),
    ...{ S, S1 },
    N: rootOfDifference(S, P, S),
    ...{ DI, DV, SH },
    DH: SH === null ? null : rootOfDifference(SH, PH, S),
    SN,
    PF: ratio(P, S),
    PF1: ratio(P1!, S1),
    harmonicPollution: ratio(SN, S1),
    thdV: ratio(VH, V1),
    thdI: ratio(IH, I1),
  };
}

/** V_h I_h cos θ_h of one order (IEEE 1459-2010, 3.1.2.3). */
export function activePower(voltage: PhasorSet, current: PhasorSet, order: number): number {
  return apparentPower(voltage, current, order) * Math.cos(phaseDifference(voltage, current, order));
}

/** V_h I_h sin θ_h of one order, positive when the current lags. */
export function reactivePower(voltage: PhasorSet, current: PhasorSet, order: number): number {
  return apparentPower(voltage, current, order) * Math.sin(phaseDifference(voltage, current, order));
}

function apparentPower(voltage: PhasorSet, current: PhasorSet, order: number): number {
  return voltage.rms[order - 1]! * current.rms[order - 1]!;
}

function phaseDifference(voltage: PhasorSet, current: PhasorSet, order: number): number {
  return ((voltage.phaseDeg[order - 1]! - current.phaseDeg[order - 1]!) * Math.PI) / 180;
}
