import type { PowerPair, ThreePhase } from '@overtally/contracts';
import { formatFixed, formatSi } from '../../../../lib/format.js';
import { percentWords } from '../../percent-words.js';

/** A quantity under its symbol, as IEEE 1459-2010 writes it. */
export interface PowerQuantity {
  symbol: string;
  subscript: string;
  name: string;
  /** `ratio` is shown as a plain number, `percent` is a plain number shown in percent. */
  unit: 'V' | 'A' | 'W' | 'var' | 'VA' | 'ratio' | 'percent';
}

const quantity = (
  symbol: string,
  subscript: string,
  unit: PowerQuantity['unit'],
  name: string,
): PowerQuantity => ({ symbol, subscript, unit, name });

/** Quantities of one voltage with its current. */
export const pairQuantities = {
  V: quantity('V', '', 'V', 'rms voltage'),
  I: quantity('I', '', 'A', 'rms current'),
  V1: quantity('V', '1', 'V', 'fundamental voltage'),
  I1: quantity('I', '1', 'A', 'fundamental current'),
  VH: quantity('V', 'H', 'V', 'voltage but for order 1, DC included'),
  IH: quantity('I', 'H', 'A', 'current but for order 1, DC included'),
  S: quantity('S', '', 'VA', 'apparent power'),
  S1: quantity('S', '1', 'VA', 'fundamental apparent power'),
  SN: quantity('S', 'N', 'VA', 'nonfundamental apparent power'),
  SH: quantity('S', 'H', 'VA', 'harmonic apparent power'),
  P: quantity('P', '', 'W', 'active power'),
  P1: quantity('P', '1', 'W', 'fundamental active power'),
  PH: quantity('P', 'H', 'W', 'harmonic active power, DC included'),
  N: quantity('N', '', 'var', 'nonactive power'),
  Q1: quantity('Q', '1', 'var', 'fundamental reactive power'),
  DI: quantity('D', 'I', 'var', 'current distortion power'),
  DV: quantity('D', 'V', 'var', 'voltage distortion power'),
  DH: quantity('D', 'H', 'var', 'harmonic distortion power'),
  PF: quantity('PF', '', 'ratio', 'power factor, P/S'),
  PF1: quantity('PF', '1', 'ratio', 'displacement power factor, P1/S1'),
  harmonicPollution: quantity('S', 'N/S1', 'percent', 'harmonic pollution, SN/S1'),
  thdV: quantity('THD', 'V', 'percent', 'VH/V1, DC included'),
  thdI: quantity('THD', 'I', 'percent', 'IH/I1, DC included'),
} as const satisfies Partial<Record<keyof PowerPair, PowerQuantity>>;
export type PairKey = keyof typeof pairQuantities;

/** Quantities of three phases together. */
export const threePhaseQuantities = {
  Ve: quantity('V', 'e', 'V', 'effective voltage'),
  Ie: quantity('I', 'e', 'A', 'effective current'),
  Ve1: quantity('V', 'e1', 'V', 'fundamental effective voltage'),
  Ie1: quantity('I', 'e1', 'A', 'fundamental effective current'),
  Se: quantity('S', 'e', 'VA', 'effective apparent power'),
  Se1: quantity('S', 'e1', 'VA', 'fundamental effective apparent power'),
  SeN: quantity('S', 'eN', 'VA', 'nonfundamental effective apparent power'),
  SU1: quantity('S', 'U1', 'VA', 'fundamental unbalance power'),
  S1plus: quantity('S', '1+', 'VA', 'positive-sequence fundamental apparent power'),
  Sarithmetic: quantity('S', 'A', 'VA', 'arithmetic apparent power'),
  P: quantity('P', '', 'W', 'active power of the three phases'),
  P1plus: quantity('P', '1+', 'W', 'positive-sequence fundamental active power'),
  Q1plus: quantity('Q', '1+', 'var', 'positive-sequence fundamental reactive power'),
  PFe: quantity('PF', 'e', 'ratio', 'effective power factor, P/Se'),
} as const satisfies Partial<Record<keyof ThreePhase, PowerQuantity>>;
export type ThreePhaseKey = keyof typeof threePhaseQuantities;

/** The symbol in a line of text or a file: SN, P1+. */
export const plainSymbol = ({ symbol, subscript }: PowerQuantity): string => `${symbol}${subscript}`;

/** A value with its unit, SI prefix and sign. */
export function showQuantity(value: number | null, { unit }: PowerQuantity): string {
  if (unit === 'ratio') return formatFixed(value, 4);
  if (unit === 'percent') return percentWords(value === null ? null : 100 * value, 2);
  return formatSi(value, unit);
}

/** Unit of the plain value in files. */
export const fileUnit = ({ unit }: PowerQuantity): string =>
  unit === 'ratio' || unit === 'percent' ? '1' : unit;

export const directionWords = {
  'into-load': 'into the load',
  'from-load': 'from the load',
} as const;
