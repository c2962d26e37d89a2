import type { ChannelAnalysis } from '@overtally/contracts';
import { formatDb, formatFixed, formatHz, formatSi } from '../../../lib/format.js';
import { formatToUncertainty } from '../../../lib/format-uncertainty.js';
import { densityUnit } from '../charts/frequency-chart.js';
import { percentEntry, type FigureEntry } from './figure-entry.js';

/** Figures of a single tone (IEEE 1241, IEC 60268-3). */
export function toneRows(channel: ChannelAnalysis): FigureEntry[] {
  const { tone } = channel;
  return [
    ...ratios(channel),
    ...(tone
      ? [
          level(channel, 'Level', '', tone.levelDbfs, 'of a full-scale sine', 'dBFS'),
          bits('ENOB, full scale', tone.enobFullScaleBits, 'referred to a full-scale sine', null),
          density(channel),
          percentEntry(channel, 'THD+N in the band', '', tone.thdPlusNBandPercent, bandWords(tone.bandHz)),
        ]
      : []),
  ];
}

function ratios(channel: ChannelAnalysis): FigureEntry[] {
  const { uncertainty, enobBits } = channel;
  return [
    level(channel, 'SINAD', 'sinadDb', channel.sinadDb, 'signal to noise and distortion'),
    level(channel, 'SNR', 'snrDb', channel.snrDb, 'signal to noise without harmonics'),
    level(channel, 'SFDR', 'sfdrDb', channel.sfdrDb, 'to the largest other line'),
    bits('ENOB', enobBits, 'from SINAD', uncertainty.enobBits ?? null),
  ];
}

function level(
  { uncertainty }: ChannelAnalysis,
  name: string,
  key: string,
  value: number | null,
  basis: string,
  unit = 'dB',
): FigureEntry {
  const known = uncertainty[key] ?? null;
  const plain = unit === 'dB' ? formatDb(value, 2) : formatFixed(value, 2, unit);
  const shown = known ? formatToUncertainty(value, known.expanded, unit) : plain;
  return { name, value, unit, basis, uncertainty: known, shown };
}

function bits(
  name: string,
  value: number | null,
  basis: string,
  known: FigureEntry['uncertainty'],
): FigureEntry {
  const shown = known ? formatToUncertainty(value, known.expanded, 'bit') : formatFixed(value, 2, 'bit');
  return { name, value, unit: 'bit', basis, uncertainty: known, shown };
}

function density({ tone, unit }: ChannelAnalysis): FigureEntry {
  const value = tone?.noiseDensity ?? null;
  return {
    name: 'Noise density',
    value,
    unit: densityUnit(unit),
    shown: formatSi(value, densityUnit(unit), { digits: 3 }),
    uncertainty: null,
    basis: 'rms of the noise floor per root hertz',
  };
}

function bandWords(band: { fromHz: number; toHz: number } | null): string {
  return band ? `${formatHz(band.fromHz, 0)} to ${formatHz(band.toHz, 0)}` : '';
}
