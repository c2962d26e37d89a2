import type { StudySeries } from '@overtally/contracts';
import type { FourierSeries } from '@overtally/dsp';

export interface HarmonicsText {
  text: string;
  /** What the second column is. */
  amounts: 'rms' | 'percent';
  frequencyHz: number;
  /** rms of order 1; percent refer to it. */
  fundamentalRms: number;
}

export type ReadHarmonics = { series: StudySeries; problem: null } | { series: null; problem: string };

const columnWords = 'order, amount and, if known, phase in degrees';

/**
 * Harmonics as they are typed or pasted: one order a line with its amount (rms, or percent of order 1) and, if known, its
 * phase in degrees (cosine form); columns parted by tab, semicolon, comma or spaces; order 0 is DC. Lines that begin with #
 * and a heading are left out.
 *
 * @returns the series, or a sentence that names the line and its cure
 */
export function readHarmonics({ text, amounts, frequencyHz, fundamentalRms }: HarmonicsText): ReadHarmonics {
  const refuse = (problem: string): ReadHarmonics => ({ series: null, problem });
  if (!(frequencyHz > 0)) return refuse('The fundamental frequency must be above 0 Hz.');
  if (amounts === 'percent' && !(fundamentalRms > 0))
    return refuse('Percent refer to the rms of order 1; give one above 0.');
  const factor = amounts === 'percent' ? fundamentalRms / 100 : 1;
  const components: StudySeries['components'] = [];
  const seen = new Map<number, number>();
  let dc = 0;
  for (const [index, line] of text.split(/\r?\n/).entries()) {
    const at = `Line ${index + 1}`;
    const trimmed = line.trim();
    if (trimmed === '' || trimmed.startsWith('#')) continue;
    const cells = cellsOf(trimmed.replaceAll(/\s+(?=[%°])/g, ''));
    const numbers = cells.map((cell) => (cell === '' ? null : numberIn(cell)));
    if (seen.size === 0 && numbers.every((number) => number === null || Number.isNaN(number))) continue;
    const wrong = numbers.findIndex((number) => Number.isNaN(number));
    if (wrong >= 0)
      return refuse(
        `${at}: “${cells[wrong]}” is no number; a line holds ${columnWords}, such as 5 0.42 -120.`,
      );
    const [order, amount, phase] = numbers;
    if (order === null || order === undefined || !Number.isInteger(order) || order < 0 || order > 1000)
      return refuse(`${at}: the order is “${cells[0]}”; it must be a whole number from 0 (DC) to 1000.`);
    if (amount === null || amount === undefined)
      return refuse(`${at}: order ${order} has no amount; a line holds ${columnWords}.`);
    if (numbers.length > 3)
      return refuse(`${at} has ${numbers.length} columns; a line holds ${columnWords}.`);
    const earlier = seen.get(order);
    if (earlier !== undefined)
      return refuse(`${at}: order ${order} stands in line ${earlier} too; keep one.`);
    seen.set(order, index + 1);
    if (order === 0) dc = amount * factor;
    else if (amount < 0)
      return refuse(`${at}: the amount of order ${order} is negative; turn its phase by 180° instead.`);
    else components.push({ order, rms: amount * factor, phaseDeg: phase ?? null });
  }
  if (components.length === 0) return refuse('Give at least one order.');
  components.sort((a, b) => a.order - b.order);
  return { series: { frequencyHz, dc, components }, problem: null };
}

/** Cells by the first separator that occurs: tab, semicolon, comma with other digits about it, spaces. */
function cellsOf(line: string): string[] {
  const separator = line.includes('\t') ? '\t' : line.includes(';') ? ';' : null;
  if (separator) return line.split(separator).map((cell) => cell.trim());
  // "5 0,42" has a decimal comma; "5, 0.42, -120" and "5,0.42" have commas between the columns.
  if (/,\s/.test(line) || (line.includes(',') && !/\s/.test(line)))
    return line.split(',').map((cell) => cell.trim());
  return line.split(/\s+/);
}

function numberIn(cell: string): number {
  const plain = cell.replace(/[%°]$/, '').trim().replace(',', '.').replace('\u2212', '-');
  return plain === '' ? Number.NaN : Number(plain);
}

/** A series as text for the field. */
export function harmonicsText({ dc, components }: FourierSeries): string {
  const rows = components.map(({ order, rms, phaseDeg }) =>
    [order, Number(rms.toPrecision(9)), ...(phaseDeg === null ? [] : [Number(phaseDeg.toPrecision(9))])].join(
      '\t',
    ),
  );
  return [...(dc === 0 ? [] : [`0\t${dc}`]), ...rows].join('\n');
}
