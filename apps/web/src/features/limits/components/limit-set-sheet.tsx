import { Box, Text } from '@chakra-ui/react';
import type { LimitEntry, LimitSet } from '@overtally/contracts';
import { useState } from 'react';
import type { Scale } from '../../../components/charts/amplitude-axis.js';
import { FigureFrame } from '../../../components/figure-frame.js';
import { MarginColumn, MarginItem, MarginLayout } from '../../../components/margin-column.js';
import { Plot } from '../../../components/plot.js';
import { Segmented } from '../../../components/segmented.js';
import type { TableColumn } from '../../../components/table-column.js';
import { TableTwin } from '../../../components/table-twin.js';
import { TitleBlock, type TitleCell } from '../../../components/title-block.js';
import { parameterWords } from '../../../components/verdict/verdict-words.js';
import { formatSi } from '../../../lib/format.js';
import { limitSetName } from '../../../lib/limit-set-name.js';
import { usePalette } from '../../../lib/theme/use-palette.js';
import { limitChart } from '../limit-chart.js';
import { basisWords, confidenceWords, evidenceWords, orderRange, quantityWords } from '../limit-words.js';

/** Everything a limit set says: its values as a ceiling and as numbers, and where they come from. */
export function LimitSetSheet({ set }: { set: LimitSet }) {
  return (
    <>
      <TitleBlock label="Limit set" cells={titleCells(set)} />
      <MarginLayout margin={<SetMargin set={set} />}>
        <Ceiling set={set} />
      </MarginLayout>
    </>
  );
}

function titleCells(set: LimitSet): TitleCell[] {
  return [
    { caption: 'Standard', value: set.standard || 'none named' },
    { caption: 'Edition', value: set.edition || 'not stated', grow: 2 },
    ...(set.tableRef ? [{ caption: 'Place', value: set.tableRef }] : []),
    { caption: 'Quantity', value: quantityWords[set.quantity] },
    {
      caption: 'Limits in',
      value: set.basis === 'absolute' ? `${set.unit}, rms` : basisWords[set.basis],
      grow: 1.5,
    },
    { caption: 'Orders', value: orderRange(set) },
    {
      caption: 'Confidence',
      value: confidenceWords[set.confidence],
      grow: 1.5,
      ...(set.confidence === 'low' ? { tone: 'near' as const } : {}),
    },
  ];
}

function Ceiling({ set }: { set: LimitSet }) {
  const palette = usePalette();
  const [scale, setScale] = useState<Scale>('log');
  const { traces, layout } = limitChart(set, scale, palette);
  return (
    <FigureFrame
      title="Limit by order"
      subtitle={set.basis === 'absolute' ? `rms in ${set.unit}` : basisWords[set.basis]}
      toggles={
        <Segmented
          label="Scale"
          value={scale}
          options={[
            { value: 'log', label: 'Log' },
            { value: 'linear', label: 'Linear' },
          ]}
          onChange={setScale}
        />
      }
      table={
        <TableTwin
          caption={`Limits of ${limitSetName(set)}`}
          columns={columns(set)}
          rows={set.orders}
          rowKey={(row) => row.order}
          fileName={`limits-${set.title}`}
        />
      }
    >
      <Plot label={`Limits of ${limitSetName(set)} by order`} traces={traces} layout={layout} height={380} />
    </FigureFrame>
  );
}

function columns(set: LimitSet): TableColumn<LimitEntry>[] {
  const caps: TableColumn<LimitEntry>[] = [
    {
      key: 'cap',
      header: 'At most',
      fileHeader: 'At most (A)',
      align: 'right',
      value: (row) => row.capA ?? null,
      show: (row) => formatSi(row.capA, 'A', { trim: true }),
    },
  ];
  return [
    { key: 'order', header: 'Order', fileHeader: 'Order', align: 'right', value: (row) => row.order },
    {
      key: 'limit',
      header: 'Limit',
      fileHeader: `Limit (${set.unit})`,
      align: 'right',
      value: (row) => row.limit,
      show: (row) => formatSi(row.limit, set.unit, { trim: true }),
    },
    ...(set.orders.some((row) => row.capA !== undefined) ? caps : []),
  ];
}

function SetMargin({ set }: { set: LimitSet }) {
  const { totals, parameters, source, notes, projectId } = set;
  return (
    <MarginColumn title="About the values">
      <MarginItem title="Check the current edition" tone="near">
        Standards are amended. Before a verdict leaves the house, compare these values with the edition that
        applies{projectId === null ? '' : ' and with the source named below'}.
      </MarginItem>
      {totals.length > 0 ? (
        <MarginItem title="Totals">
          {totals.map((total) => (
            <Text key={total.name} fontSize="13px">
              {total.name} up to order {total.maxOrder}:{' '}
              <Box as="span" fontFamily="mono">
                {formatSi(total.limit, total.name === 'THD' || total.name === 'TDD' ? '%' : set.unit, {
                  trim: true,
                })}
              </Box>
            </Text>
          ))}
        </MarginItem>
      ) : null}
      {parameters.length > 0 ? (
        <MarginItem title="Asked for when judging">
          {parameters.map((name) => parameterWords[name].label).join(', ')}
        </MarginItem>
      ) : null}
      <MarginItem title="Source" foot={evidenceWords(set.evidence)}>
        {source.map((entry) => (
          <Text key={entry} fontSize="13px" overflowWrap="anywhere">
            {entry}
          </Text>
        ))}
      </MarginItem>
      {notes.map((note) => (
        <MarginItem key={note}>{note}</MarginItem>
      ))}
    </MarginColumn>
  );
}
