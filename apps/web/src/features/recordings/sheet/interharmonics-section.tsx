import { Button } from '@chakra-ui/react';
import type { ChannelAnalysis, Recording } from '@overtally/contracts';
import { useMemo, useState } from 'react';
import { FigureFrame } from '../../../components/figure-frame.js';
import type { TableColumn } from '../../../components/table-column.js';
import { TableTwin } from '../../../components/table-twin.js';
import { formatPercent, formatSi } from '../../../lib/format.js';
import { fundamentalSymbol } from '../charts/words.js';

type Interharmonic = ChannelAnalysis['interharmonics'][number];

/** Interharmonic groups and centred subgroups (IEC 61000-4-7, annex A), opened on request. */
export function InterharmonicsSection({
  recording,
  channel,
}: {
  recording: Recording;
  channel: ChannelAnalysis;
}) {
  const [open, setOpen] = useState(false);
  const columns = useMemo(() => columnsOf(channel), [channel]);
  const { interharmonics, unit } = channel;
  const largest = interharmonics.toSorted((a, b) => b.groupRms - a.groupRms)[0];
  if (!largest) return null;
  const [below, above] = largest.betweenOrders;
  return (
    <FigureFrame
      title="Interharmonics"
      subtitle={`largest group ${formatSi(largest.groupRms, unit)}, between orders ${below} and ${above}`}
      toggles={
        <Button size="xs" variant="ghost" aria-expanded={open} onClick={() => setOpen(!open)}>
          {open ? 'Hide' : 'Show'} the table
        </Button>
      }
    >
      {open ? (
        <TableTwin
          caption={`Interharmonics of ${channel.name}`}
          columns={columns}
          rows={interharmonics}
          rowKey={(row) => row.betweenOrders.join('-')}
          fileName={`${recording.number}-interharmonics`}
          maxHeight="420px"
        />
      ) : null}
    </FigureFrame>
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
