import { Box, Text } from '@chakra-ui/react';
import type { LimitEntry, LimitSet } from '@overtally/contracts';
import { limitRows, neededParameters, optionalParameters } from '@overtally/limits';
import { useState } from 'react';
import type { Scale } from '../../../components/charts/amplitude-axis.js';
import { FormField, SelectInput } from '../../../components/form-field.js';
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
import { drawnOrders, limitChart } from '../limit-chart.js';
import {
  basisWords,
  confidenceWords,
  evidenceWords,
  orderRange,
  quantityWords,
  rowChoiceWords,
  unitOfEntry,
} from '../limit-words.js';

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
    ...(set.projectId === null ? [] : [{ caption: 'Version', value: String(set.version) }]),
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
  const rows = limitRows(set);
  const [row, setRow] = useState(0);
  const shown = rows[row]?.set ?? set;
  const { traces, layout } = limitChart(shown, scale, palette);
  const undrawn = shown.orders.length - drawnOrders(shown).length;
  return (
    <FigureFrame
      title="Limit by order"
      subtitle={shown.basis === 'absolute' ? `rms in ${shown.unit}` : basisWords[shown.basis]}
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
          columns={columns(shown)}
          rows={shown.orders}
          rowKey={(row) => row.order}
          fileName={`limits-${set.title}`}
        />
      }
    >
      {rows.length > 1 ? (
        <Box maxW="480px" mb="3">
          <FormField label={rowChoiceWords[set.rowChoice ?? 'range']}>
            <SelectInput
              options={rows.map(({ label }, index) => ({ value: String(index), label: label ?? '' }))}
              value={String(row)}
              onChange={(event) => setRow(Number(event.target.value))}
            />
          </FormField>
        </Box>
      ) : null}
      <Totals set={shown} />
      {undrawn > 0 ? (
        <Text fontSize="13px" color="inkSoft" mb="2">
          {undrawn === 1 ? '1 limit' : `${undrawn} limits`} in another unit: see the table.
        </Text>
      ) : null}
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
      show: (row) => shownLimit(row, set),
    },
    ...(set.orders.some((row) => row.formula !== undefined) ? [formulaColumn] : []),
    ...(set.orders.some((row) => row.capA !== undefined) ? caps : []),
  ];
}

const formulaColumn: TableColumn<LimitEntry> = {
  key: 'formula',
  header: 'Worked out from',
  fileHeader: 'Worked out from',
  value: (row) => row.formula ?? null,
  show: (row) => row.formula ?? '',
};

/** A limit in its own unit; one that is multiplied by a parameter says by which. */
function shownLimit(entry: LimitEntry, set: LimitSet): string {
  const { limit, timesParameter } = entry;
  const amount = formatSi(limit, unitOfEntry(entry, set), { trim: true });
  return timesParameter ? `${amount} × ${parameterWords[timesParameter].label.toLowerCase()}` : amount;
}

/** Totals of the limits that are shown; unnamed where there are none. */
function Totals({ set: { totals, unit } }: { set: LimitSet }) {
  if (totals.length === 0) return null;
  const parts = totals.map(({ name, limit, maxOrder }) => {
    const shown = formatSi(limit, name === 'THD' || name === 'TDD' ? '%' : unit, { trim: true });
    return `${name} up to order ${maxOrder}: ${shown}`;
  });
  return (
    <Text fontSize="13px" mb="2">
      {parts.join('; ')}
    </Text>
  );
}

function SetMargin({ set }: { set: LimitSet }) {
  const { source, notes, projectId, applicability = [] } = set;
  const parameters = neededParameters(set);
  const checked = optionalParameters(set);
  return (
    <MarginColumn title="About the values">
      <MarginItem title="Check the current edition" tone="near">
        Standards are amended. Before a verdict leaves the house, compare these values with the edition that
        applies{projectId === null ? '' : ' and with the source named below'}.
      </MarginItem>
      {parameters.length > 0 ? (
        <MarginItem title="Asked for when judging">
          {parameters.map((name) => parameterWords[name].label).join(', ')}
        </MarginItem>
      ) : null}
      {checked.length > 0 ? (
        <MarginItem title="Checked when given">
          {checked.map((name) => parameterWords[name].label).join(', ')}
        </MarginItem>
      ) : null}
      {applicability.length > 0 ? (
        <MarginItem title="Where it does not apply">
          {applicability.map(({ otherwise }) => (
            <Text key={otherwise} fontSize="13px">
              {otherwise}.
            </Text>
          ))}
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
