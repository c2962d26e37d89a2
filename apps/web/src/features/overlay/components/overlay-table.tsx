import { TableTwin } from '../../../components/table-twin.js';
import type { TableColumn } from '../../../components/table-column.js';
import { formatSi } from '../../../lib/format.js';
import type { OverlayView } from '../overlay-link.js';
import { ordersShown, valueAt, type OverlaySeries } from '../series.js';

interface OverlayTableProps {
  series: readonly OverlaySeries[];
  view: OverlayView;
  limits: readonly { order: number; limit: number }[];
}

interface Row {
  order: number;
  limit: number | null;
}

/** Orders down, channels across. */
export function OverlayTable({ series, view, limits }: OverlayTableProps) {
  const limitOf = new Map(limits.map(({ order, limit }) => [order, limit]));
  const rows = ordersShown(series, view.orders).map((order) => ({
    order,
    limit: limitOf.get(order) ?? null,
  }));
  const unitOf = (one: OverlaySeries) => (view.amplitude === 'relative' ? '%' : one.summary.unit);
  const columns: TableColumn<Row>[] = [
    { key: 'order', header: 'Order', fileHeader: 'Order', align: 'right', value: (row) => row.order },
    ...series.map((one): TableColumn<Row> => {
      const unit = unitOf(one);
      return {
        key: one.key,
        header: one.label,
        fileHeader: `${one.label} (${view.amplitude === 'relative' ? '% of fundamental' : unit})`,
        align: 'right',
        value: (row) => valueAt(one.summary, row.order, view.amplitude),
        show: (row) => formatSi(valueAt(one.summary, row.order, view.amplitude), unit),
        tone: (row) => {
          const value = valueAt(one.summary, row.order, view.amplitude);
          return row.limit !== null && value !== null && value > row.limit ? 'over' : undefined;
        },
      };
    }),
    ...(limits.length > 0 && series[0] ? [limitColumn(unitOf(series[0]))] : []),
  ];
  return (
    <TableTwin
      caption="Orders of the overlaid channels"
      columns={columns}
      rows={rows}
      rowKey={(row) => row.order}
      fileName="overlay"
      initialSort={{ key: 'order', descending: false }}
    />
  );
}

function limitColumn(unit: string): TableColumn<Row> {
  return {
    key: 'limit',
    header: 'Limit',
    fileHeader: `Limit (${unit})`,
    align: 'right',
    value: (row) => row.limit,
    show: (row) => formatSi(row.limit, unit),
  };
}
