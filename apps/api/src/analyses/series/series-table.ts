import type { SeriesFigure } from '@overtally/contracts';
import type { schema } from '@overtally/db';
import { aggregateSeries } from '@overtally/dsp';
import type { Storage } from '../../storage/storage.js';
import { placeOf } from './series-layout.js';
import { readRow, type StoredChannelSeries } from './stored-series.js';

/** Windows that are written at a time. */
const blockWindows = 6000;

interface TableOptions {
  figure: SeriesFigure;
  /** Windows in an interval, that is, in a line of the table. */
  factor: number;
  unit: string;
}

/**
 * A figure with all its orders over time as lines of CSV (RFC 4180): start of the interval, whether it is flagged, then a
 * column for each order. A figure that does not apply leaves its cell empty.
 */
export async function* seriesTable(
  storage: Storage,
  stored: StoredChannelSeries,
  { figure, factor, unit }: TableOptions,
): AsyncGenerator<string> {
  const { shape } = stored;
  const names = columnNames(shape, figure);
  yield line(['time (s)', 'flagged', ...names.map((name) => `${name} (${unit})`)]);
  const block = Math.max(1, Math.floor(blockWindows / factor)) * factor;
  const end = Math.floor(shape.count / factor) * factor;
  for (let from = 0; from < end; from += block) {
    const range: [number, number] = [from, Math.min(end, from + block)];
    const startS = await readRow(storage, stored, 'start', 0, range);
    const flagged = await readRow(storage, stored, 'flagged', 0, range);
    const columns: Float64Array[] = [];
    for (const row of names.keys()) {
      const values = await readRow(storage, stored, figure, row, range);
      columns.push(factor === 1 ? values : aggregateSeries(values, flagged, factor).values);
    }
    yield linesOf(columns, startS, flagged, factor);
  }
}

function linesOf(
  columns: Float64Array[],
  startS: Float64Array,
  flagged: Float64Array,
  factor: number,
): string {
  const lines = Array.from({ length: startS.length / factor }, (_, i) => {
    const isFlagged = flagged.subarray(i * factor, (i + 1) * factor).includes(1);
    const values = columns.map((values) => (Number.isFinite(values[i]) ? String(values[i]) : ''));
    return line([String(startS[i * factor]), isFlagged ? '1' : '0', ...values]);
  });
  return lines.join('');
}

/** Names of the rows of a figure, which become columns of the table. */
function columnNames(shape: schema.StoredSeries, figure: SeriesFigure): string[] {
  const { rows } = placeOf(shape, figure);
  const indices = [...Array(rows).keys()];
  switch (figure) {
    case 'line':
    case 'group':
    case 'subgroup':
      return indices.map((index) => `order ${index + 1}`);
    case 'interharmonicGroup':
    case 'centredSubgroup':
      return indices.map((index) => `between ${index} and ${index + 1}`);
    case 'band':
      return shape.bandCentresHz.map((centreHz) => `${centreHz} Hz`);
    case 'frequency':
    case 'rms':
    case 'thd':
    case 'thdg':
    case 'thds':
    case 'pwhd':
      return [figure];
  }
}

const line = (cells: string[]): string => `${cells.join(',')}\r\n`;
