import type { ChannelAnalysis } from '@overtally/contracts';
import type { TableColumn } from '../../../components/table-column.js';
import { formatFixed, formatHz, formatSi } from '../../../lib/format.js';
import { formatToUncertainty, formatUncertainty } from '../../../lib/format-uncertainty.js';
import { isOver, resultWords, type OrderRow } from '../charts/order-rows.js';
import { fundamentalSymbol } from '../charts/words.js';
import { percentWords } from '../percent-words.js';

type Column = TableColumn<OrderRow>;

function amount(key: keyof OrderRow, header: string, unit: string): Column {
  const value = (row: OrderRow) => row[key] as number | null;
  return {
    key,
    header,
    fileHeader: unit ? `${header} (${unit})` : header,
    align: 'right',
    value,
    show: (row) => formatSi(value(row), unit),
  };
}

/** Columns of the orders; those that hold nothing for this channel are left out. */
export function orderColumns(
  rows: readonly OrderRow[],
  { unit, quantity, tone }: Pick<ChannelAnalysis, 'unit' | 'quantity' | 'tone'>,
): Column[] {
  const symbol = fundamentalSymbol(quantity);
  const dbc = (row: OrderRow) => tone?.harmonicsDbc[row.order - 2] ?? null;
  const columns: Column[] = [
    { key: 'order', header: 'Order', fileHeader: 'Order', align: 'right', value: (row) => row.order },
    {
      key: 'frequencyHz',
      header: 'Frequency',
      fileHeader: 'Frequency (Hz)',
      align: 'right',
      value: (row) => row.frequencyHz,
      show: (row) => formatHz(row.frequencyHz, 2),
    },
    {
      key: 'rms',
      header: 'rms',
      fileHeader: unit ? `rms (${unit})` : 'rms',
      align: 'right',
      value: (row) => row.rms,
      show: (row) => formatToUncertainty(row.rms, row.uncertainty, unit),
    },
    {
      key: 'uncertainty',
      header: '±, k = 2',
      fileHeader: unit
        ? `Expanded uncertainty of rms, k = 2 (${unit})`
        : 'Expanded uncertainty of rms, k = 2',
      align: 'right',
      value: (row) => row.uncertainty,
      show: (row) => formatUncertainty(row.uncertainty, unit),
    },
    {
      key: 'percentOfFundamental',
      header: `of ${symbol}`,
      fileHeader: 'Share of the fundamental (%)',
      align: 'right',
      value: (row) => row.percentOfFundamental,
      show: (row) => percentWords(row.percentOfFundamental, 2),
    },
    {
      key: 'dbc',
      header: 'to the tone',
      fileHeader: 'Relative to the tone (dBc)',
      align: 'right',
      value: dbc,
      show: (row) => formatFixed(dbc(row), 1, 'dBc'),
    },
    {
      key: 'phaseDeg',
      header: 'Phase',
      fileHeader: 'Phase, cosine form (deg)',
      align: 'right',
      value: (row) => row.phaseDeg,
      show: (row) => formatFixed(row.phaseDeg, 1, '°'),
    },
    amount('groupRms', 'Group', unit),
    amount('subgroupRms', 'Subgroup', unit),
    amount('smoothedMaxRms', 'Highest, 1.5 s', unit),
    amount('limit', 'Limit', unit),
    {
      key: 'sharePercent',
      header: 'Share',
      fileHeader: 'Share of the limit (%)',
      align: 'right',
      value: (row) => row.sharePercent,
      show: (row) => percentWords(row.sharePercent),
      tone: (row) => (isOver(row) ? 'over' : undefined),
    },
    {
      key: 'result',
      header: 'Result',
      fileHeader: 'Result',
      value: (row) => row.result && resultWords[row.result],
      tone: (row) => (isOver(row) ? 'over' : row.result === 'pass' ? 'within' : 'inkSoft'),
    },
  ];
  return columns.filter((column) => rows.some((row) => column.value(row) !== null));
}
