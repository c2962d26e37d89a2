import type { TransformerFactors } from './types.js';

export interface TransformerOptions {
  /** Highest order that counts, default 50. */
  maxOrder?: number;
  /** I_R of the nameplate, for the rated K-factor. */
  ratedCurrentA?: number | null;
  /** e: eddy-current loss over resistive loss at the fundamental, default 0.1. */
  eddyLossRatio?: number;
  /** q: 1.7 for round or rectangular conductors in both windings (default), 1.5 for foil. */
  eddyLossExponent?: number;
}

/**
 * Loss factors of a transformer for the orders of its load current, without DC.
 *
 * - K-factor: UL 1561 (referred to the rated current) and the same sum referred to the measured rms.
 * - F_HL and F_HL-STR: IEEE C57.110-2018, clause 5 (h² for eddy-current loss of the windings, h^0.8 for other stray losses).
 * - Factor K of the European practice (BS 7821, EN 50464-3, EN 50541): √(1 + e/(1+e) (I_1/I)² Σ_{h≥2} h^q (I_h/I_1)²).
 *
 * The sums grow with the number of orders: state `maxOrder` with them.
 *
 * @param currentRms I_1, I_2, … in A
 * @returns all null without any current
 */
export function transformerFactors(
  currentRms: ArrayLike<number>,
  options: TransformerOptions = {},
): TransformerFactors {
  const { ratedCurrentA = null, eddyLossRatio: e = 0.1, eddyLossExponent: q = 1.7 } = options;
  const squares = Array.from(currentRms)
    .slice(0, options.maxOrder ?? 50)
    .map((rms) => rms * rms);
  const weighted = (exponent: number) =>
    squares.reduce((sum, square, i) => sum + (i + 1) ** exponent * square, 0);
  const total = weighted(0);
  const eddy = weighted(2);
  const overTotal = (sum: number) => (total > 0 ? sum / total : null);
  const fundamental = squares[0] ?? 0;
  return {
    maxOrder: squares.length,
    kFactorMeasured: overTotal(eddy),
    kFactorRated: ratedCurrentA !== null && ratedCurrentA > 0 ? eddy / ratedCurrentA ** 2 : null,
    fhl: overTotal(eddy),
    fhlStr: overTotal(weighted(0.8)),
    factorKEn:
      total > 0 && fundamental > 0
        ? Math.sqrt(1 + ((e / (1 + e)) * (weighted(q) - fundamental)) / total)
        : null,
  };
}
