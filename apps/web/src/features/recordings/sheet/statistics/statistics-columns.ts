import type { Statistics } from '@overtally/contracts';
import type { TableColumn } from '../../../../components/table-column.js';
import { formatSi } from '../../../../lib/format.js';
import type { OrderStatistics } from '../../charts/statistics-chart.js';

/** Columns of what orders did over the windows. */
export function orderStatisticsColumns(unit: string): TableColumn<OrderStatistics>[] {
  const amount = (key: keyof Statistics, header: string): TableColumn<OrderStatistics> => ({
    ...{ key, header, fileHeader: unit ? `${header} (${unit})` : header, align: 'right' },
    value: (row) => row[key],
    show: (row) => formatSi(row[key], unit),
  });
  return [
    { key: 'order', header: 'Order', fileHeader: 'Order', align: 'right', value: (row) => row.order },
    amount('mean', 'Mean'),
    amount('p95', '95 %'),
    amount('p99', '99 %'),
    amount('max', 'Highest'),
  ];
}
