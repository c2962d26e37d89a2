import { Box, Flex, useBreakpointValue } from '@chakra-ui/react';
import type { ThreePhase } from '@overtally/contracts';
import { useMemo, useState } from 'react';
import { FigureFrame } from '../../../../components/figure-frame.js';
import { Plot } from '../../../../components/plot.js';
import { Segmented } from '../../../../components/segmented.js';
import type { TableColumn } from '../../../../components/table-column.js';
import { TableTwin } from '../../../../components/table-twin.js';
import { formatFixed, formatSi } from '../../../../lib/format.js';
import { usePalette } from '../../../../lib/theme/use-palette.js';
import { sequenceChart, sequenceColor, sequences, type SequenceOrder } from '../../charts/sequence-chart.js';

type Quantity = 'voltage' | 'current';
const height = 240;
const options = [
  { value: 'voltage', label: 'Voltages' },
  { value: 'current', label: 'Currents' },
] as const;

interface SequenceFigureProps {
  set: ThreePhase;
  fileName: string;
}

/** Symmetrical components of every order (Fortescue). */
export function SequenceFigure({ set, fileName }: SequenceFigureProps) {
  const palette = usePalette();
  const labelStep = useBreakpointValue({ base: 10, sm: 5, lg: 2 }, { ssr: false }) ?? 2;
  const [quantity, setQuantity] = useState<Quantity>('current');
  const orders = quantity === 'voltage' ? set.voltageSequences : set.currentSequences;
  const unit = quantity === 'voltage' ? 'V' : 'A';
  const chart = useMemo(
    () => sequenceChart(orders, unit, labelStep, palette),
    [orders, unit, labelStep, palette],
  );
  const columns = useMemo(() => columnsOf(unit), [unit]);
  const title = `Symmetrical components of the ${quantity}s by order`;
  return (
    <FigureFrame
      title={title}
      toggles={<Segmented label="Quantity" value={quantity} options={options} onChange={setQuantity} />}
      table={
        <TableTwin
          caption={title}
          columns={columns}
          rows={orders}
          rowKey={(row) => row.order}
          fileName={`${fileName}-${quantity}-sequences`}
          maxHeight="480px"
        />
      }
    >
      <Plot label={title} height={height} traces={chart.traces} layout={chart.layout} />
      <Flex as="ul" listStyleType="none" wrap="wrap" columnGap="5" fontSize="xs" color="inkSoft">
        {sequences.map(({ key, glyph, style }) => (
          <li key={key}>
            <Box as="span" aria-hidden="true" color={sequenceColor(style, palette)} mr="1.5">
              {glyph}
            </Box>
            {key} sequence
          </li>
        ))}
      </Flex>
    </FigureFrame>
  );
}

function columnsOf(unit: string): TableColumn<SequenceOrder>[] {
  return [
    { key: 'order', header: 'Order', fileHeader: 'Order', align: 'right', value: (row) => row.order },
    ...sequences.flatMap(({ key }): TableColumn<SequenceOrder>[] => {
      const name = key.charAt(0).toUpperCase() + key.slice(1);
      return [
        {
          ...{ key, header: name, fileHeader: `${name} sequence (${unit})`, align: 'right' },
          value: (row) => row[key].rms,
          show: (row) => formatSi(row[key].rms, unit),
        },
        {
          ...{ key: `${key}-phase`, header: 'Phase', fileHeader: `Phase of the ${key} sequence (deg)` },
          align: 'right',
          value: (row) => row[key].phaseDeg,
          show: (row) => formatFixed(row[key].phaseDeg, 1, '°'),
        },
      ];
    }),
  ];
}
