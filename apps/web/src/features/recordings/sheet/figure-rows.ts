import type { ChannelAnalysis } from '@overtally/contracts';
import { formatCount, formatDb, formatFixed, formatSi } from '../../../lib/format.js';
import { fundamentalWords } from '../../../lib/fundamental-words.js';
import { fundamentalSymbol } from '../charts/words.js';
import { percentWords } from './percent-words.js';

/** One figure of a channel, as shown and as exported. */
export interface FigureRow {
  name: string;
  shown: string;
  value: number;
  unit: string;
  /** What it counts or refers to. */
  basis: string;
}

type Entry = Omit<FigureRow, 'value'> & { value: number | null };

/** Figures of a channel that apply to it; those that are null are left out. */
export function figureRows(channel: ChannelAnalysis): FigureRow[] {
  return [...waveform(channel), ...distortion(channel), ...windows(channel)].filter(
    (row): row is FigureRow => row.value !== null,
  );
}

function waveform(channel: ChannelAnalysis): Entry[] {
  const { unit, fundamental } = channel;
  const amount = (name: string, value: number | null, basis: string): Entry => ({
    ...{ name, value, unit, basis },
    shown: formatSi(value, unit),
  });
  const ratio = (name: string, value: number | null, basis: string): Entry => ({
    ...{ name, value, unit: '', basis },
    shown: formatFixed(value, 3),
  });
  const frequency = fundamentalWords(channel);
  return [
    {
      name: 'Fundamental frequency',
      shown: frequency,
      value: fundamental?.frequencyHz ?? null,
      unit: 'Hz',
      basis: frequency.includes('±') ? 'k = 2, from the residual of the fit' : 'from the fit over the record',
    },
    amount(`Fundamental ${fundamentalSymbol(channel.quantity)}`, fundamental?.rms ?? null, 'rms of order 1'),
    amount('rms', channel.rms, 'all of the record, DC included'),
    amount('Mean', channel.mean, 'DC component'),
    amount('Peak', channel.peak, 'largest magnitude'),
    ratio('Crest factor', channel.crestFactor, 'peak / rms'),
    ratio('Form factor', channel.formFactor, 'rms / mean of the magnitude'),
  ];
}

function distortion(channel: ChannelAnalysis): Entry[] {
  const highest = channel.harmonics.at(-1)?.order ?? channel.thdMaxOrder;
  const orders = `orders 2 to ${Math.min(channel.thdMaxOrder, highest)}`;
  const percent = (name: string, value: number | null, basis: string): Entry => ({
    ...{ name, value, unit: '%', basis },
    shown: percentWords(value, value !== null && value < 1 ? 4 : 2),
  });
  const level = (name: string, value: number | null, basis: string): Entry => ({
    ...{ name, value, unit: 'dB', basis },
    shown: formatDb(value, 2),
  });
  return [
    percent('THD, of the fundamental', channel.thdFPercent, `THD_F, ${orders}`),
    percent('THD, of the rms', channel.thdRPercent, `THD_R, ${orders}`),
    percent('THD+N', channel.thdPlusNPercent, 'distortion and noise, of the total AC rms'),
    level('SINAD', channel.sinadDb, 'signal to noise and distortion'),
    level('SNR', channel.snrDb, 'signal to noise without harmonics'),
    level('SFDR', channel.sfdrDb, 'to the largest other line'),
    {
      name: 'ENOB',
      shown: formatFixed(channel.enobBits, 2, 'bit'),
      value: channel.enobBits,
      unit: 'bit',
      basis: 'from SINAD',
    },
  ];
}

function windows({ windows: used }: ChannelAnalysis): Entry[] {
  if (!used) return [];
  return [
    {
      name: 'Windows',
      shown: formatCount(used.count),
      value: used.count,
      unit: '',
      basis: `of ${used.cycles} cycles, ${formatFixed(used.samplesPerWindow, 1)} samples each`,
    },
  ];
}
