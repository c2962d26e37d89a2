import type { ChannelAnalysis, Recording } from '@overtally/contracts';
import { useMemo } from 'react';
import { FoldingFigure } from '../../../components/folding-figure.js';
import type { TableColumn } from '../../../components/table-column.js';
import { TableTwin } from '../../../components/table-twin.js';
import { formatPercent, formatSi } from '../../../lib/format.js';
import { fundamentalSymbol } from '../charts/words.js';

type Interharmonic = ChannelAnalysis['interharmonics'][number];

/** Interharmonic groups and centred subgroups (IEC 61000-4-7, annex A), opened on request. */
export function InterharmonicsSection({
  recording,
  channel,
  onFollow,
}: {
  recording: Recording;
  channel: ChannelAnalysis;
  /** Shows the group above an order over time. */
  onFollow: (lowerOrder: number) => void;
}) {
  const columns = useMemo(() => columnsOf(channel), [channel]);
  const { interharmonics, unit } = channel;
  const largest = interharmonics.toSorted((a, b) => b.groupRms - a.groupRms)[0];
  if (!largest) return null;
  const [below, above] = largest.betweenOrders;
  return (
    <FoldingFigure
      title="Interharmonics"
      subtitle={`largest group ${formatSi(largest.groupRms, unit)}, between orders ${below} and ${above}`}
    >
      <TableTwin
        caption={`Interharmonics of ${channel.name}`}
        columns={columns}
        rows={interharmonics}
        rowKey={(row) => row.betweenOrders.join('-')}
        fileName={`${recording.number}-interharmonics`}
        onSelect={(row) => onFollow(row.betweenOrders[0])}
        maxHeight="420px"
      />
    </FoldingFigure>
  );
}

function columnsOf({ unit, quantity, fundamental }: ChannelAnalysis): TableColumn<Interharmonic>[] {
  const amount = (key: 'groupRms' | 'centredSubgroupRms', header: string): TableColumn<Interharmonic> => ({
    ...{ key, header, fileHeader: unit ? `${header} (${unit})` : header, align: 'right' },
    value: (row) => row[key],
    show: (row) => formatSi(row[key], unit),
  });
  const share = ({ groupRms }: Interharmonic) => (fundamental ? (100 * groupRms) / fundamental.rms : null);
  return [
    {
      key: 'between',
      header: 'Between orders',
      fileHeader: 'Below order',
      align: 'right',
      value: (row) => row.betweenOrders[1],
      show: (row) => row.betweenOrders.join(' and '),
    },
    amount('groupRms', 'Group'),
    {
      key: 'share',
      header: `Group, of ${fundamentalSymbol(quantity)}`,
      fileHeader: 'Group, share of the fundamental (%)',
      align: 'right',
      value: share,
      show: (row) => formatPercent(share(row), 3),
    },
    amount('centredSubgroupRms', 'Centred subgroup'),
  ];
}
