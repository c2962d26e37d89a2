/** Rating of a line reactor, three-phase. */
export interface LineReactorRating {
  /** Reactance at rated frequency in percent of the rated impedance. */
  impedancePercent: number;
  /** Between lines. */
  ratedVoltageV: number;
  ratedCurrentA: number;
  ratedFrequencyHz: number;
}

/**
 * Inductance of one phase of a line reactor in H: its percent impedance times the rated impedance U_n/(√3 I_n), over 2πf_n
 * (the definition of the short-circuit impedance in percent, IEC 60076-6).
 */
export function lineReactorInductance(rating: LineReactorRating): number {
  const { impedancePercent, ratedVoltageV, ratedCurrentA, ratedFrequencyHz } = rating;
  const ratedImpedance = ratedVoltageV / Math.sqrt(3) / ratedCurrentA;
  return ((impedancePercent / 100) * ratedImpedance) / (2 * Math.PI * ratedFrequencyHz);
}
