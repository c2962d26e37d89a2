import { Text } from '@chakra-ui/react';
import type { OrderVerdict, RepeatOrder, TotalVerdict } from '@overtally/contracts';
import { formatPercent, formatSi, none } from '../../lib/format.js';
import type { TableColumn } from '../table-column.js';
import { partWords, verdictTone } from './verdict-words.js';

const shareTone = ({ result }: Pick<OrderVerdict, 'result'>) =>
  result === 'fail' || result === 'conditional-fail' ? ('over' as const) : undefined;

/** Why a result is what it is; left out where no row needs a reason. */
function reasonColumn<Row extends { reason: string | null }>(rows: readonly Row[]): TableColumn<Row>[] {
  if (rows.every(({ reason }) => reason === null)) return [];
  return [
    {
      key: 'reason',
      header: 'Reason',
      fileHeader: 'Reason',
      value: (row) => row.reason,
      show: ({ reason }) => (
        <Text as="span" display="block" fontSize="xs" color="inkSoft" whiteSpace="normal" minW="44" maxW="md">
          {reason}
        </Text>
      ),
    },
  ];
}

/** Spread of the repeats of each order; none for a verdict over one analysis. */
function spreadColumns(spread: readonly RepeatOrder[]): TableColumn<OrderVerdict>[] {
  if (spread.length === 0) return [];
  const byOrder = new Map(spread.map((row) => [row.order, row]));
  const column = (
    key: 'repeatabilityPercent' | 'deviationPercent',
    header: string,
  ): TableColumn<OrderVerdict> => ({
    key,
    header,
    fileHeader: `${header} (% of limit)`,
    align: 'right',
    value: ({ order }) => byOrder.get(order)?.[key] ?? null,
    show: ({ order }) => formatPercent(byOrder.get(order)?.[key] ?? null),
  });
  return [
    column('repeatabilityPercent', 'Spread s, of limit'),
    column('deviationPercent', 'Furthest, of limit'),
  ];
}

/**
 * Columns of a verdict order by order; amounts in `unit`. Uncertainties are shown where any is known, and the spread of
 * repeats where there are some.
 */
export function orderColumns(
  orders: readonly OrderVerdict[],
  unit: string,
  spread: readonly RepeatOrder[] = [],
): TableColumn<OrderVerdict>[] {
  const amount = (
    key: 'mean' | 'uncertainty' | 'smoothedMax' | 'limit' | 'margin',
    header: string,
  ): TableColumn<OrderVerdict> => ({
    key,
    header,
    fileHeader: unit ? `${header} (${unit})` : header,
    align: 'right',
    value: (row) => row[key],
    show: (row) => formatSi(row[key], unit),
  });
  const has = (key: 'uncertainty' | 'smoothedMax') => orders.some((row) => row[key] !== null);
  return [
    { key: 'order', header: 'Order', fileHeader: 'Order', align: 'right', value: (row) => row.order },
    amount('mean', 'Value'),
    ...(has('uncertainty') ? [amount('uncertainty', '± U, k = 2')] : []),
    ...(has('smoothedMax') ? [amount('smoothedMax', 'Highest, 1.5 s')] : []),
    amount('limit', 'Limit'),
    amount('margin', 'Margin'),
    {
      key: 'share',
      header: 'Share',
      fileHeader: 'Share of limit (%)',
      align: 'right',
      value: (row) => row.sharePercent,
      show: (row) => formatPercent(row.sharePercent),
      tone: shareTone,
    },
    ...spreadColumns(spread),
    {
      key: 'result',
      header: 'Result',
      fileHeader: 'Result',
      value: (row) => partWords[row.result],
      tone: (row) => verdictTone(row.result) ?? 'inkSoft',
    },
    ...reasonColumn(orders),
  ];
}

/** Columns of the totals (THD, THC and their like); each has its own unit. */
export function totalColumns(totals: readonly TotalVerdict[]): TableColumn<TotalVerdict>[] {
  return [
    {
      key: 'name',
      header: 'Total',
      fileHeader: 'Total',
      value: ({ name, unit }) => (unit ? `${name} (${unit})` : name),
      show: (row) => row.name,
    },
    {
      key: 'value',
      header: 'Value',
      fileHeader: 'Value',
      align: 'right',
      value: (row) => row.value,
      show: (row) => formatSi(row.value, row.unit),
    },
    {
      key: 'limit',
      header: 'Limit',
      fileHeader: 'Limit',
      align: 'right',
      value: (row) => row.limit,
      show: (row) => (row.limit === null ? none : formatSi(row.limit, row.unit, { trim: true })),
    },
    {
      key: 'share',
      header: 'Share',
      fileHeader: 'Share of limit (%)',
      align: 'right',
      value: (row) => row.sharePercent,
      show: (row) => formatPercent(row.sharePercent),
      tone: shareTone,
    },
    {
      key: 'result',
      header: 'Result',
      fileHeader: 'Result',
      value: (row) => partWords[row.result],
      tone: (row) => verdictTone(row.result) ?? 'inkSoft',
    },
    ...reasonColumn(totals),
  ];
}
