import { Text, useBreakpointValue } from '@chakra-ui/react';
import type { PowerPair } from '@overtally/contracts';
import { useMemo } from 'react';
import { FigureFrame } from '../../../../components/figure-frame.js';
import { Plot } from '../../../../components/plot.js';
import type { TableColumn } from '../../../../components/table-column.js';
import { TableTwin } from '../../../../components/table-twin.js';
import { formatFixed, formatSi, none } from '../../../../lib/format.js';
import { usePalette } from '../../../../lib/theme/use-palette.js';
import { orderPowerChart } from '../../charts/order-power-chart.js';
import { directionWords } from './quantities.js';

type OrderPower = PowerPair['orders'][number];
const height = 240;

interface OrderPowerFigureProps {
  pair: PowerPair;
  name: string;
  fileName: string;
}

/** Active power by order with its direction. */
export function OrderPowerFigure({ pair, name, fileName }: OrderPowerFigureProps) {
  const palette = usePalette();
  const labelStep = useBreakpointValue({ base: 10, sm: 5, lg: 2 }, { ssr: false }) ?? 2;
  const chart = useMemo(
    () => orderPowerChart(pair.orders, labelStep, palette),
    [pair.orders, labelStep, palette],
  );
  if (pair.orders.length === 0) return null;
  const title = `Active power by order, ${name}`;
  const from = pair.orders.filter(({ direction }) => direction === 'from-load').map(({ order }) => order);
  return (
    <FigureFrame
      title={title}
      subtitle={fromWords(from)}
      table={
        <TableTwin
          caption={title}
          columns={columns}
          rows={pair.orders}
          rowKey={(row) => row.order}
          fileName={fileName}
          maxHeight="480px"
        />
      }
    >
      <Plot
        label={`${title}: ${fromWords(from)}`}
        height={height}
        traces={chart.traces}
        layout={chart.layout}
      />
      <Text fontSize="xs" color="inkSoft">
        Hatched bars: from the load. Grey: order 1, and orders whose direction lies in the noise.
      </Text>
    </FigureFrame>
  );
}

function fromWords(orders: readonly number[]): string {
  if (orders.length === 0) return 'all orders into the load';
  if (orders.length > 6) return `${orders.length} orders from the load`;
  return `${orders.length === 1 ? 'order' : 'orders'} ${orders.join(', ')} from the load`;
}

const amount = (
  key: 'voltageRms' | 'currentRms' | 'P' | 'Q',
  header: string,
  unit: string,
): TableColumn<OrderPower> => ({
  ...{ key, header, fileHeader: `${header} (${unit})`, align: 'right' },
  value: (row) => row[key],
  show: (row) => formatSi(row[key], unit),
});
const angle = (
  key: 'phaseDifferenceDeg' | 'voltagePhaseZeroCrossingDeg' | 'currentPhaseZeroCrossingDeg',
  header: string,
  fileHeader: string,
): TableColumn<OrderPower> => ({
  ...{ key, header, fileHeader: `${fileHeader} (deg)`, align: 'right' },
  value: (row) => row[key],
  show: (row) => formatFixed(row[key], 1, '°'),
});
const direction = (row: OrderPower) => (row.direction === null ? null : directionWords[row.direction]);

const columns: TableColumn<OrderPower>[] = [
  { key: 'order', header: 'Order', fileHeader: 'Order', align: 'right', value: (row) => row.order },
  amount('voltageRms', 'Voltage', 'V'),
  amount('currentRms', 'Current', 'A'),
  angle('phaseDifferenceDeg', 'Angle', 'Angle of the voltage minus that of the current'),
  amount('P', 'P', 'W'),
  amount('Q', 'Q', 'var'),
  {
    key: 'direction',
    header: 'Direction',
    fileHeader: 'Direction',
    value: direction,
    show: (row) => direction(row) ?? none,
  },
  angle(
    'voltagePhaseZeroCrossingDeg',
    'Phase of the voltage',
    'Phase of the voltage, sine form from its zero crossing',
  ),
  angle(
    'currentPhaseZeroCrossingDeg',
    'Phase of the current',
    'Phase of the current, sine form from the zero crossing of the voltage',
  ),
];
