import { AnalysisInputError } from '../errors.js';
import { requirePositive } from './network-data.js';

/** What a shunt filter shall do; per phase quantities follow for a star of three branches. */
export interface ShuntFilterDemand {
  /** Voltage between lines (or across the branch of a single phase). */
  voltageV: number;
  /** Reactive power at the fundamental that the filter delivers, all phases (or the single one). */
  reactivePowerVar: number;
  frequencyHz: number;
  /** Order it is tuned to, above 1; 3 to 10 % below the harmonic is usual, such as 4.7 for the fifth. */
  tuningOrder: number;
}

/** Components of one phase. */
export interface ShuntFilterComponents {
  capacitanceF: number;
  inductanceH: number;
  /** XL XC to the half power at the tuned frequency, in Ω. */
  characteristicImpedanceOhm: number;
}

/**
 * Capacitance and inductance of a single-tuned or second-order high-pass filter: X_C = h0²/(h0² − 1) · U²/Q,
 * X_L = X_C/h0² (IEEE Std 1531; J. C. Das, Power System Harmonics and Passive Filter Designs). The resistance follows from
 * the quality: in series X_n/q for the single-tuned filter, in parallel with the coil q X_n for the high-pass.
 *
 * @throws AnalysisInputError for a demand that no filter can meet
 */
export function designTunedFilter(demand: ShuntFilterDemand): ShuntFilterComponents {
  const { omega, order } = checked(demand);
  const capacitive = ((order ** 2 / (order ** 2 - 1)) * demand.voltageV ** 2) / demand.reactivePowerVar;
  return components(capacitive, capacitive / order ** 2, omega);
}

/**
 * Components of a C-type filter, whose coil and auxiliary capacitor resonate at the fundamental, so that its resistance
 * has no loss there: X_C1 = U²/Q, X_L = X_C2 = X_C1/(h0² − 1). The resistance in parallel is q h0 X_L for the quality q.
 *
 * @throws AnalysisInputError for a demand that no filter can meet
 */
export function designCTypeFilter(
  demand: ShuntFilterDemand,
): ShuntFilterComponents & { auxiliaryCapacitanceF: number } {
  const { omega, order } = checked(demand);
  const main = demand.voltageV ** 2 / demand.reactivePowerVar;
  const inductive = main / (order ** 2 - 1);
  return {
    ...components(main, inductive, omega),
    characteristicImpedanceOhm: order * inductive,
    auxiliaryCapacitanceF: 1 / (omega * inductive),
  };
}

/**
 * Order at which a capacitor bank and the network resonate in parallel: √(S_sc/Q_c), the load and all resistance aside
 * (IEEE Std 519).
 */
export function parallelResonanceOrder(shortCircuitPowerVA: number, capacitorPowerVar: number): number {
  if (!(shortCircuitPowerVA > 0 && capacitorPowerVar > 0)) {
    throw new AnalysisInputError(
      'Short-circuit power and reactive power of the bank must be greater than 0.',
    );
  }
  return Math.sqrt(shortCircuitPowerVA / capacitorPowerVar);
}

function checked(demand: ShuntFilterDemand): { omega: number; order: number } {
  requirePositive(demand);
  if (!(demand.tuningOrder > 1)) {
    throw new AnalysisInputError(`The filter is tuned to order ${demand.tuningOrder}; it must be above 1.`);
  }
  return { omega: 2 * Math.PI * demand.frequencyHz, order: demand.tuningOrder };
}

function components(capacitiveOhm: number, inductiveOhm: number, omega: number): ShuntFilterComponents {
  return {
    capacitanceF: 1 / (omega * capacitiveOhm),
    inductanceH: inductiveOhm / omega,
    characteristicImpedanceOhm: Math.sqrt(capacitiveOhm * inductiveOhm),
  };
}
