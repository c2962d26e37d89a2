import type { ChannelAnalysis, Uncertainty } from '@overtally/contracts';
import { formatToUncertainty } from '../../../lib/format-uncertainty.js';
import { percentWords } from '../percent-words.js';

/** One figure of a channel, as shown and as exported. */
export interface FigureRow {
  name: string;
  shown: string;
  value: number;
  unit: string;
  /** Null where nothing is known of it. */
  uncertainty: Uncertainty | null;
  /** What it counts or refers to. */
  basis: string;
}

/** A figure that may not apply. */
export type FigureEntry = Omit<FigureRow, 'value'> & { value: number | null };

/** A figure in percent, with the digits of its uncertainty or as many as a reader needs. */
export function percentEntry(
  { uncertainty }: ChannelAnalysis,
  name: string,
  key: string,
  value: number | null,
  basis: string,
): FigureEntry {
  const known = uncertainty[key] ?? null;
  const shown = known
    ? formatToUncertainty(value, known.expanded, '%')
    : percentWords(value, value !== null && value < 1 ? 4 : 2);
  return { name, value, unit: '%', basis, uncertainty: known, shown };
}
