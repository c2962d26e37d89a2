import type { ImportOptions } from '@overtally/contracts';
import { formatSi, signed } from '../../../lib/format.js';
import { numberText } from '../../../lib/number-text.js';
import { ratioText } from '../import/column-draft.js';
import { quantityWords } from '../quantity-words.js';

export const delimiterWords: Record<string, string> = {
  ',': 'comma',
  ';': 'semicolon',
  '\t': 'tab',
  ' ': 'space',
  '|': 'bar',
};
export const decimalWords: Record<string, string> = { '.': 'point', ',': 'comma' };
export const timeUnitWords: Record<string, string> = { s: 's', ms: 'ms', us: 'µs', ns: 'ns' };
export const missingWords: Record<string, string> = {
  keep: 'kept as missing',
  interpolate: 'bridged',
  refuse: 'not read',
};
export const unevenWords: Record<string, string> = {
  resample: 'resampled',
  'take-as-even': 'taken as even',
  refuse: 'not read',
};

type ChannelOptions = NonNullable<ImportOptions['channels']>[number];

/** A column in words: its name, or its number counted from 1. */
const columnWords = (column: number | string) =>
  typeof column === 'number' ? `column ${column + 1}` : `column “${column}”`;

const figure = (value: number) => signed(numberText(value));

/** Import options in words, one entry for each thing that is set; none where everything is detected. */
export function optionsWords(options: ImportOptions): string[] {
  const { sampleRateHz, delimiter, decimal, headerRows, timeColumn, timeUnit } = options;
  const words: string[] = [];
  if (sampleRateHz !== undefined) {
    words.push(`sample rate ${formatSi(sampleRateHz, 'Hz', { digits: 9, trim: true })}`);
  }
  if (delimiter !== undefined) words.push(`delimiter ${delimiterWords[delimiter]}`);
  if (decimal !== undefined) words.push(`decimal ${decimalWords[decimal]}`);
  if (headerRows !== undefined) {
    words.push(`${headerRows === 1 ? '1 line' : `${headerRows} lines`} before the numbers`);
  }
  if (timeColumn === null) words.push('no time column');
  if (timeColumn !== null && timeColumn !== undefined) words.push(`time in ${columnWords(timeColumn)}`);
  if (timeUnit !== undefined) words.push(`time unit ${timeUnitWords[timeUnit]}`);
  if (options.missingValues !== undefined) {
    words.push(`cells without a number ${missingWords[options.missingValues]}`);
  }
  if (options.unevenTime !== undefined) {
    words.push(`uneven time stamps ${unevenWords[options.unevenTime]}`);
  }
  return [...words, ...(options.channels ?? []).map(channelWords)];
}

/** "column 2: u1, voltage in V, probe 100 : 1, inverted" */
function channelWords(channel: ChannelOptions): string {
  const { name, quantity, unit, probeRatio, fullScale, gain, offset, inverted } = channel;
  const quantityText = quantity === undefined ? '' : quantityWords[quantity];
  const parts = [
    name ?? '',
    unit ? `${quantityText || 'unit'} ${quantityText ? 'in ' : ''}${unit}` : quantityText,
    probeRatio === undefined ? '' : `probe ${ratioText(probeRatio)}`,
    fullScale === undefined ? '' : `full scale ${figure(fullScale)}${unit ? ` ${unit}` : ''}`,
    gain === undefined ? '' : `gain ${figure(gain)}`,
    offset === undefined ? '' : `offset ${figure(offset)}`,
    inverted ? 'inverted' : '',
  ].filter(Boolean);
  const column = columnWords(channel.column);
  return parts.length > 0 ? `${column}: ${parts.join(', ')}` : column;
}
