import { AnalysisInputError } from '../errors.js';

/** Resistance and inductance in series, of one phase. */
export interface SeriesElements {
  resistanceOhm: number;
  inductanceH: number;
}

export interface SupplyData {
  /** Between lines. */
  voltageV: number;
  /** Three-phase short-circuit power at the bus. */
  shortCircuitPowerVA: number;
  /** X/R at the fundamental. */
  reactanceToResistance: number;
  frequencyHz: number;
}

/**
 * Impedance of a supply from its short-circuit power: abs(Z) = U²/S, parted by X/R (IEC 60909-0 without its voltage factor
 * c). The inductance is taken to be the same at all harmonics, and so is the resistance, which is lower than in fact at high
 * orders: resonances come out sharper than they are.
 *
 * @throws AnalysisInputError for a value that is not greater than 0
 */
export function supplyImpedance(data: SupplyData): SeriesElements {
  requirePositive(data);
  const { voltageV, shortCircuitPowerVA, reactanceToResistance, frequencyHz } = data;
  return parted(voltageV ** 2 / shortCircuitPowerVA, reactanceToResistance, frequencyHz);
}

export interface TransformerData {
  ratedPowerVA: number;
  /** Between lines, of the side that the impedance is wanted for. */
  ratedVoltageV: number;
  /** uk. */
  shortCircuitVoltagePercent: number;
  /** X/R of the short-circuit impedance. */
  reactanceToResistance: number;
  frequencyHz: number;
}

/**
 * Leakage inductance and winding resistance of a transformer, both windings together: abs(Z) = uk U²/S (IEC 60076-1),
 * parted by X/R.
 *
 * @throws AnalysisInputError for a value that is not greater than 0
 */
export function transformerImpedance(data: TransformerData): SeriesElements {
  requirePositive(data);
  const { ratedPowerVA, ratedVoltageV, shortCircuitVoltagePercent, reactanceToResistance, frequencyHz } =
    data;
  const size = ((shortCircuitVoltagePercent / 100) * ratedVoltageV ** 2) / ratedPowerVA;
  return parted(size, reactanceToResistance, frequencyHz);
}

/** An impedance of given size at a frequency as resistance and inductance. */
function parted(sizeOhm: number, reactanceToResistance: number, frequencyHz: number): SeriesElements {
  const resistanceOhm = sizeOhm / Math.hypot(1, reactanceToResistance);
  return {
    resistanceOhm,
    inductanceH: (resistanceOhm * reactanceToResistance) / (2 * Math.PI * frequencyHz),
  };
}

/** @throws AnalysisInputError that names the first value that is not greater than 0 */
export function requirePositive(values: object): void {
  for (const [name, value] of Object.entries(values) as [string, number][]) {
    if (!(value > 0 && value < Infinity)) {
      throw new AnalysisInputError(`${name} is ${value}; it must be greater than 0.`);
    }
  }
}
