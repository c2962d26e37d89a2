import { Table, Text, useBreakpointValue } from '@chakra-ui/react';
import type { ChannelAnalysis, Recording } from '@overtally/contracts';
import { useMemo, useState } from 'react';
import { FoldingFigure } from '../../../../components/folding-figure.js';
import { Plot } from '../../../../components/plot.js';
import { Segmented } from '../../../../components/segmented.js';
import { TableTwin } from '../../../../components/table-twin.js';
import { formatCount, formatSi } from '../../../../lib/format.js';
import { usePalette } from '../../../../lib/theme/use-palette.js';
import { statisticsChart, type OrderStatistics } from '../../charts/statistics-chart.js';
import { orderStatisticsColumns } from './statistics-columns.js';

type Grouping = 'group' | 'subgroup';
const height = 240;

interface StatisticsSectionProps {
  recording: Recording;
  channel: ChannelAnalysis;
}

/** What orders and distortion did over the windows: mean, 95 %, 99 % and highest, by order. */
export function StatisticsSection({ recording, channel }: StatisticsSectionProps) {
  const [grouping, setGrouping] = useState<Grouping>(channel.quantity === 'current' ? 'group' : 'subgroup');
  const rows = useMemo(() => orderStatistics(channel, grouping), [channel, grouping]);
  const columns = useMemo(() => orderStatisticsColumns(channel.unit), [channel.unit]);
  if (!channel.windows || (rows.length === 0 && !channel.distortion)) return null;
  const title = 'Statistics over the windows';
  return (
    <FoldingFigure
      title={title}
      subtitle={windowWords(channel.windows)}
      toggles={<Segmented label="Grouping" value={grouping} options={groupings} onChange={setGrouping} />}
      table={
        <TableTwin
          caption={`${title}: ${grouping}s of ${channel.name}`}
          columns={columns}
          rows={rows}
          rowKey={(row) => row.order}
          fileName={`${recording.number}-${channel.name}-${grouping}-statistics`}
          maxHeight="420px"
        />
      }
    >
      <OrderWhiskers rows={rows} channel={channel} grouping={grouping} />
      <DistortionTable channel={channel} />
    </FoldingFigure>
  );
}

const groupings = [
  { value: 'group', label: 'Groups' },
  { value: 'subgroup', label: 'Subgroups' },
] as const;

function orderStatistics({ harmonics }: ChannelAnalysis, grouping: Grouping): OrderStatistics[] {
  return harmonics.flatMap(({ order, groupStatistics, subgroupStatistics }) => {
    const statistics = grouping === 'group' ? groupStatistics : subgroupStatistics;
    return statistics ? [{ order, ...statistics }] : [];
  });
}

function windowWords({ count, flaggedCount }: NonNullable<ChannelAnalysis['windows']>): string {
  const counted = count - flaggedCount;
  const words = `${formatCount(counted)} ${counted === 1 ? 'window' : 'windows'}`;
  return flaggedCount > 0 ? `${words}, ${formatCount(flaggedCount)} flagged left out` : words;
}

function OrderWhiskers({
  rows,
  channel,
  grouping,
}: {
  rows: readonly OrderStatistics[];
  channel: ChannelAnalysis;
  grouping: Grouping;
}) {
  const palette = usePalette();
  const labelStep = useBreakpointValue({ base: 10, sm: 5, lg: 2 }, { ssr: false }) ?? 2;
  const chart = useMemo(
    () => statisticsChart(rows, channel.unit, labelStep, palette),
    [rows, channel.unit, labelStep, palette],
  );
  if (rows.length === 0) return null;
  return (
    <>
      <Plot
        label={`${grouping}s of ${channel.name} by order: mean, 95 %, 99 % and highest over the windows`}
        height={height}
        traces={chart.traces}
        layout={chart.layout}
      />
      <Text fontSize="xs" color="inkSoft">
        ● mean, — 95 % and 99 % of the windows lie below, ▲ highest.
      </Text>
    </>
  );
}

const names = {
  thd: 'THD, single lines',
  thdg: 'THDG, groups',
  thds: 'THDS, subgroups',
  pwhd: 'PWHD, weighted',
} as const;

function DistortionTable({ channel: { distortion, name } }: { channel: ChannelAnalysis }) {
  if (!distortion) return null;
  const figures = Object.keys(names) as (keyof typeof names)[];
  const digitCell = { textAlign: 'end', fontFamily: 'mono', fontSize: '13px', whiteSpace: 'nowrap' } as const;
  return (
    <Table.ScrollArea mt="3" tabIndex={0} role="region" aria-label={`Distortion of ${name} over the windows`}>
      <Table.Root size="sm">
        <Table.Caption srOnly>Distortion of {name} over the windows (IEC 61000-4-7, 3.3)</Table.Caption>
        <Table.Header>
          <Table.Row>
            {['Distortion', 'Mean', '95 %', '99 %', 'Highest'].map((header, i) => (
              <Table.ColumnHeader key={header} scope="col" textAlign={i === 0 ? 'start' : 'end'}>
                {header}
              </Table.ColumnHeader>
            ))}
          </Table.Row>
        </Table.Header>
        <Table.Body>
          {figures.map((figure) => {
            const statistics = distortion[figure];
            if (!statistics) return null;
            const { mean, p95, p99, max } = statistics;
            return (
              <Table.Row key={figure}>
                <Table.Cell>{names[figure]}</Table.Cell>
                {[mean, p95, p99, max].map((value, i) => (
                  <Table.Cell key={i} {...digitCell}>
                    {formatSi(value, '%')}
                  </Table.Cell>
                ))}
              </Table.Row>
            );
          })}
        </Table.Body>
      </Table.Root>
    </Table.ScrollArea>
  );
}
