import { chakra, useBreakpointValue } from '@chakra-ui/react';
import type { ChannelAnalysis, Recording } from '@overtally/contracts';
import { useMemo } from 'react';
import { FigureFrame } from '../../../components/figure-frame.js';
import type { TableColumn } from '../../../components/table-column.js';
import { TableTwin } from '../../../components/table-twin.js';
import { figureRows, type FigureRow } from './figure-rows.js';

const columns: TableColumn<FigureRow>[] = [
  {
    key: 'name',
    header: 'Figure',
    fileHeader: 'Figure',
    value: (row) => row.name,
    show: (row) => <chakra.span whiteSpace="normal">{row.name}</chakra.span>,
  },
  {
    key: 'value',
    header: 'Value',
    fileHeader: 'Value',
    align: 'right',
    value: (row) => row.value,
    show: (row) => row.shown,
  },
  { key: 'unit', header: 'Unit', fileHeader: 'Unit', value: (row) => row.unit },
  {
    key: 'basis',
    header: 'Of what',
    fileHeader: 'Of what',
    value: (row) => row.basis,
    tone: () => 'inkSoft',
  },
];
/** The unit stands with the shown value; only files need a column for it. */
const shownColumns = columns.filter(({ key }) => key !== 'unit');
const narrowColumns = shownColumns.filter(({ key }) => key !== 'basis');

/** Single figures of a channel. */
export function FiguresSection({ recording, channel }: { recording: Recording; channel: ChannelAnalysis }) {
  const isWide = useBreakpointValue({ base: false, sm: true }, { ssr: false }) ?? true;
  const rows = useMemo(() => figureRows(channel), [channel]);
  return (
    <FigureFrame title="Figures" subtitle={channel.name}>
      <TableTwin
        caption={`Figures of ${channel.name}`}
        columns={isWide ? shownColumns : narrowColumns}
        fileColumns={columns}
        rows={rows}
        rowKey={(row) => row.name}
        fileName={`${recording.number}-figures`}
      />
    </FigureFrame>
  );
}
