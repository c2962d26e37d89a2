import type { ImportOptions, ImportPreview, Quantity } from '@overtally/contracts';
import { numberOf, numberText } from '../../../lib/number-text.js';

/** What a person has set for one column; what is empty stays as detected. */
export interface ColumnDraft {
  keep: boolean;
  name: string;
  quantity: Quantity | '';
  unit: string;
  probeRatio: string;
  fullScale: string;
  gain: string;
  offset: string;
  inverted: boolean;
}

export const untouchedColumn: ColumnDraft = {
  keep: true,
  name: '',
  quantity: '',
  unit: '',
  probeRatio: '',
  fullScale: '',
  gain: '',
  offset: '',
  inverted: false,
};

export type ColumnFaults = Partial<Record<'probeRatio' | 'fullScale' | 'gain' | 'offset', string>>;
export type ChannelOptions = NonNullable<ImportOptions['channels']>[number];
type Column = ImportPreview['columns'][number];

/** Largest gain, offset, ratio and full scale that is taken; the smallest ratio is its reciprocal. */
const scaleLimit = 1e12;

/**
 * Ratio of a probe or transformer as people write it: `100`, `100:1`, `2000 / 5`, `×10`; a point or a comma stands
 * before decimals. A ratio below one, such as `1:100`, is NaN, since it is written for both directions; undefined for
 * nothing at all.
 */
export function ratioOf(written: string): number | undefined {
  const [over = '', under, ...more] = written.replace(/[x×]/gi, '').split(/[:/]/);
  if (under === undefined) return numberOf(over);
  const ratio = (numberOf(over) ?? Number.NaN) / (numberOf(under) ?? Number.NaN);
  return more.length === 0 && ratio >= 1 ? ratio : Number.NaN;
}

/** A ratio as it is shown: `100 : 1`; one below 1 as the number it is. */
export const ratioText = (ratio: number): string =>
  ratio >= 1 ? `${numberText(ratio, 15)} : 1` : numberText(ratio, 15);

const fits = (value: number | undefined, least: number) =>
  value === undefined || (value >= least && value <= scaleLimit);

/** What is wrong with the fields of a column, in words. */
export function columnFaults({ probeRatio, fullScale, gain, offset }: ColumnDraft): ColumnFaults {
  const faults: ColumnFaults = {};
  if (/[:/]/.test(probeRatio) && Number.isNaN(ratioOf(probeRatio))) {
    faults.probeRatio = 'Write 100 : 1 where the probe divides by 100';
  } else if (!fits(ratioOf(probeRatio), 1 / scaleLimit)) {
    faults.probeRatio = 'Give a ratio, as 100 or 100 : 1';
  }
  if (!fits(numberOf(fullScale), 1 / scaleLimit)) faults.fullScale = 'Give a number above 0';
  if (!fits(numberOf(gain), -scaleLimit)) faults.gain = 'Give a number';
  if (numberOf(gain) === 0) faults.gain = 'A gain of 0 leaves nothing';
  if (!fits(numberOf(offset), -scaleLimit)) faults.offset = 'Give a number';
  return faults;
}

const text = (value: number | undefined) => (value === undefined ? '' : numberText(value, 15));

/** The fields filled with the options of a channel. */
export function columnOf(channel: ChannelOptions): ColumnDraft {
  return {
    keep: true,
    name: channel.name ?? '',
    quantity: channel.quantity ?? '',
    unit: channel.unit ?? '',
    probeRatio: channel.probeRatio === undefined ? '' : ratioText(channel.probeRatio),
    fullScale: text(channel.fullScale),
    gain: text(channel.gain),
    offset: text(channel.offset),
    inverted: channel.inverted ?? false,
  };
}

/** The options that the fields of a column stand for. */
export function channelOf(column: number | string, draft: ColumnDraft): ChannelOptions {
  const numbers = {
    gain: numberOf(draft.gain),
    offset: numberOf(draft.offset),
    fullScale: numberOf(draft.fullScale),
    probeRatio: ratioOf(draft.probeRatio),
  };
  return {
    column,
    ...(draft.name.trim() ? { name: draft.name.trim() } : {}),
    ...(draft.quantity ? { quantity: draft.quantity } : {}),
    ...(draft.unit.trim() ? { unit: draft.unit.trim() } : {}),
    ...Object.fromEntries(Object.entries(numbers).filter(([, value]) => value !== undefined)),
    ...(draft.inverted ? { inverted: true } : {}),
  };
}

/** Unit that a column ends up with. */
export const unitOf = (column: Column, draft: ColumnDraft): string => draft.unit.trim() || column.unit;

/** True when what scales `from` suits `to`: both have the same unit, or had it before one of them was given another. */
export function sharesUnit(
  from: { column: Column; draft: ColumnDraft },
  to: { column: Column; draft: ColumnDraft },
): boolean {
  if (unitOf(from.column, from.draft) === unitOf(to.column, to.draft)) return true;
  return to.draft.unit.trim() === '' && to.column.unit === from.column.unit;
}

/** `to` scaled like `from`; its name and whether it is read stay. */
export const scaledLike = (to: ColumnDraft, from: ColumnDraft): ColumnDraft => ({
  ...from,
  keep: to.keep,
  name: to.name,
});
