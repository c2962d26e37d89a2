import type { ThreePhase } from '@overtally/contracts';
import { FoldingFigure } from '../../../../components/folding-figure.js';
import type { TableColumn } from '../../../../components/table-column.js';
import { TableTwin } from '../../../../components/table-twin.js';
import { formatFixed, formatSi } from '../../../../lib/format.js';

type NeutralOrder = ThreePhase['neutralOrders'][number];

const columns: TableColumn<NeutralOrder>[] = [
  { key: 'order', header: 'Order', fileHeader: 'Order', align: 'right', value: (row) => row.order },
  {
    key: 'rms',
    header: 'rms',
    fileHeader: 'rms (A)',
    align: 'right',
    value: (row) => row.rms,
    show: (row) => formatSi(row.rms, 'A'),
  },
  {
    key: 'phase',
    header: 'Phase',
    fileHeader: 'Phase, cosine form (deg)',
    align: 'right',
    value: (row) => row.phaseDeg,
    show: (row) => formatFixed(row.phaseDeg, 1, '°'),
  },
];

/** The sum of the currents by order. */
export function NeutralSection({ set, fileName }: { set: ThreePhase; fileName: string }) {
  const largest = set.neutralOrders.toSorted((a, b) => b.rms - a.rms)[0];
  if (!largest) return null;
  return (
    <FoldingFigure
      title="Neutral current by order"
      subtitle={`sum of the currents, ${formatSi(set.neutralRms, 'A')}; largest ${formatSi(largest.rms, 'A')} at order ${largest.order}`}
    >
      <TableTwin
        caption="Neutral current by order"
        columns={columns}
        rows={set.neutralOrders}
        rowKey={(row) => row.order}
        fileName={fileName}
        maxHeight="420px"
      />
    </FoldingFigure>
  );
}
