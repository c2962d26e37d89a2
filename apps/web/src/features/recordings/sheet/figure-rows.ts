import type { ChannelAnalysis, Settings } from '@overtally/contracts';
import { formatCount, formatFixed, formatSi } from '../../../lib/format.js';
import { formatToUncertainty } from '../../../lib/format-uncertainty.js';
import { isBelowClock } from '../../../lib/fundamental-words.js';
import { fundamentalSymbol } from '../charts/words.js';
import { percentEntry, type FigureEntry, type FigureRow } from './figure-entry.js';
import { extentWords } from './settings/settings-words.js';
import { toneRows } from './tone-rows.js';

/** Figures of a channel that apply to it; those that are null are left out. */
export function figureRows(channel: ChannelAnalysis, settings: Settings): FigureRow[] {
  return [
    ...waveform(channel, settings),
    ...distortion(channel),
    ...toneRows(channel),
    ...windows(channel),
  ].filter((row): row is FigureRow => row.value !== null);
}

function waveform(channel: ChannelAnalysis, settings: Settings): FigureEntry[] {
  const { unit, fundamental, uncertainty } = channel;
  const amount = (name: string, value: number | null, basis: string, key = ''): FigureEntry => ({
    ...{ name, value, unit, basis, uncertainty: uncertainty[key] ?? null },
    shown: formatToUncertainty(value, uncertainty[key]?.expanded, unit),
  });
  const ratio = (name: string, value: number | null, basis: string): FigureEntry => ({
    ...{ name, value, unit: '', basis, uncertainty: null },
    shown: formatFixed(value, 3),
  });
  const extent = settings.span ? 'the span' : 'the record';
  return [
    frequency(channel, extent),
    amount(
      `Fundamental ${fundamentalSymbol(channel.quantity)}`,
      fundamental?.rms ?? null,
      'rms of order 1',
      'fundamental.rms',
    ),
    amount('rms', channel.rms, `over ${extentWords(settings)}, DC included`, 'rms'),
    amount('Mean', channel.mean, 'DC component', 'mean'),
    amount('Peak', channel.peak, 'largest magnitude'),
    ratio('Crest factor', channel.crestFactor, 'peak / rms'),
    ratio('Form factor', channel.formFactor, 'rms / mean of the magnitude'),
  ];
}

function frequency({ fundamental, uncertainty }: ChannelAnalysis, extent: string): FigureEntry {
  const row = { name: 'Fundamental frequency', unit: 'Hz', value: fundamental?.frequencyHz ?? null };
  const known = uncertainty['fundamental.frequencyHz'] ?? null;
  if (!fundamental || known === null || isBelowClock(known.expanded, fundamental.frequencyHz)) {
    const clock = known === null ? '' : '; the recorder’s clock is not in it';
    return {
      ...row,
      shown: formatFixed(row.value, known === null ? 3 : 4, 'Hz'),
      uncertainty: null,
      basis: `from the fit over ${extent}${clock}`,
    };
  }
  const shown = formatToUncertainty(fundamental.frequencyHz, known.expanded, 'Hz');
  return { ...row, shown, uncertainty: known, basis: `from the fit over ${extent}` };
}

function distortion(channel: ChannelAnalysis): FigureEntry[] {
  const highest = channel.harmonics.at(-1)?.order ?? channel.thdMaxOrder;
  const orders = `orders 2 to ${Math.min(channel.thdMaxOrder, highest)}`;
  const percent = (name: string, key: 'thdFPercent' | 'thdRPercent' | 'thdPlusNPercent', basis: string) =>
    percentEntry(channel, name, key, channel[key], basis);
  return [
    percent('THD, of the fundamental', 'thdFPercent', `THD_F, ${orders}`),
    percent('THD, of the rms', 'thdRPercent', `THD_R, ${orders}`),
    percent('THD+N', 'thdPlusNPercent', 'distortion and noise, of the total AC rms'),
  ];
}

function windows({ windows: used }: ChannelAnalysis): FigureEntry[] {
  if (!used) return [];
  const flagged = used.flaggedCount > 0 ? `, ${formatCount(used.flaggedCount)} of them flagged` : '';
  return [
    {
      name: 'Windows',
      shown: formatCount(used.count),
      value: used.count,
      unit: '',
      uncertainty: null,
      basis: `of ${used.cycles} cycles, ${formatFixed(used.samplesPerWindow, 1)} samples each${flagged}`,
    },
    {
      name: 'Synchronisation error',
      shown: formatSi(used.synchronisationErrorPercent, '%', { digits: 2 }),
      value: used.synchronisationErrorPercent,
      unit: '%',
      uncertainty: null,
      basis: 'largest deviation of a window from whole cycles',
    },
  ];
}
