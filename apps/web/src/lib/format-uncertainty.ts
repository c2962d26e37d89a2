import { roundToUncertainty } from '@overtally/dsp';
import { absent, formatSi, none, prefixOf, signed, type Figure, type SiOptions } from './format.js';

/** No-break space between number and unit (SI brochure, 9th ed., 5.4.3). */
const gap = '\u00a0';

function rounded(value: number, expanded: number, unit: string) {
  const prefix = prefixOf(Math.max(Math.abs(value), expanded), unit);
  // Dividing by a whole power keeps the decimal that was meant (0.001 is not exact in binary).
  const scale = (amount: number) =>
    prefix.exponent < 0 ? amount * 10 ** -prefix.exponent : amount / 10 ** prefix.exponent;
  const text = roundToUncertainty(scale(value), scale(expanded));
  return {
    value: signed(text.value),
    expanded: text.expanded,
    tail: unit ? `${gap}${prefix.sign}${unit}` : '',
  };
}

const isKnown = (expanded: Figure): expanded is number => !absent(expanded) && expanded > 0;

/** A figure of a record is never shown finer than this share of it, however quiet the record is. */
const finest = 1e-5;

/**
 * A value with the digits that its expanded uncertainty supports (JCGM 100:2008, 7.2.6), seven or so at most; four where
 * there is none.
 */
export function formatToUncertainty(
  value: Figure,
  expanded: Figure,
  unit: string,
  options: SiOptions = {},
): string {
  if (absent(value)) return none;
  if (!isKnown(expanded)) return formatSi(value, unit, options);
  const text = rounded(value, Math.max(expanded, Math.abs(value) * finest), unit);
  return `${text.value}${text.tail}`;
}

/** An expanded uncertainty in two significant digits, with a prefix of its own: 7.4 mA. */
export function formatUncertainty(expanded: Figure, unit: string): string {
  return isKnown(expanded) ? formatSi(expanded, unit, { digits: 2 }) : none;
}

/** Both to the same place, under one unit: 49.98100 ± 0.00020 Hz. */
export function formatWithUncertainty(value: Figure, expanded: Figure, unit: string): string {
  if (absent(value)) return none;
  if (!isKnown(expanded)) return formatSi(value, unit);
  const text = rounded(value, expanded, unit);
  return `${text.value}${gap}±${gap}${text.expanded}${text.tail}`;
}
