import { chakra, Text, useBreakpointValue } from '@chakra-ui/react';
import type { ChannelAnalysis, Recording, Settings } from '@overtally/contracts';
import { useMemo } from 'react';
import { FigureFrame } from '../../../components/figure-frame.js';
import type { TableColumn } from '../../../components/table-column.js';
import { TableTwin } from '../../../components/table-twin.js';
import { formatUncertainty } from '../../../lib/format-uncertainty.js';
import type { FigureRow } from './figure-entry.js';
import { figureRows } from './figure-rows.js';
import { UncertaintyBudget } from './uncertainty-budget.js';

const name: TableColumn<FigureRow> = {
  key: 'name',
  header: 'Figure',
  fileHeader: 'Figure',
  value: (row) => row.name,
  show: (row) => <chakra.span whiteSpace="normal">{row.name}</chakra.span>,
};
const value: TableColumn<FigureRow> = {
  key: 'value',
  header: 'Value',
  fileHeader: 'Value',
  align: 'right',
  value: (row) => row.value,
  show: (row) => row.shown,
};
const expanded: TableColumn<FigureRow> = {
  key: 'expanded',
  header: '±, k = 2',
  fileHeader: 'Expanded uncertainty (k = 2)',
  align: 'right',
  value: (row) => row.uncertainty?.expanded ?? null,
  show: (row) => (row.uncertainty ? formatUncertainty(row.uncertainty.expanded, row.unit) : ''),
};
const basis: TableColumn<FigureRow> = {
  key: 'basis',
  header: 'Of what',
  fileHeader: 'Of what',
  value: (row) => row.basis,
  tone: () => 'inkSoft',
};
/** The unit stands with the shown value; only files need a column for it. */
const unit: TableColumn<FigureRow> = {
  key: 'unit',
  header: 'Unit',
  fileHeader: 'Unit',
  value: (row) => row.unit,
};
/** Value over uncertainty in one column, for narrow screens. */
const both: TableColumn<FigureRow> = {
  ...value,
  show: (row) => (
    <>
      {row.shown}
      {row.uncertainty ? (
        <chakra.span display="block" color="inkSoft" fontSize="xs">
          ± {formatUncertainty(row.uncertainty.expanded, row.unit)}
        </chakra.span>
      ) : null}
    </>
  ),
};

interface FiguresSectionProps {
  recording: Recording;
  channel: ChannelAnalysis;
  settings: Settings;
}

/** Single figures of a channel with their uncertainties. */
export function FiguresSection({ recording, channel, settings }: FiguresSectionProps) {
  const isWide = useBreakpointValue({ base: false, sm: true }, { ssr: false }) ?? true;
  const rows = useMemo(() => figureRows(channel, settings), [channel, settings]);
  const isAny = rows.some(({ uncertainty }) => uncertainty !== null);
  const wide = isAny ? [name, value, expanded, basis] : [name, value, basis];
  return (
    <FigureFrame title="Figures" subtitle={channel.name}>
      <TableTwin
        caption={`Figures of ${channel.name}`}
        columns={isWide ? wide : [name, both]}
        fileColumns={[name, value, ...(isAny ? [expanded] : []), unit, basis]}
        rows={rows}
        rowKey={(row) => row.name}
        fileName={`${recording.number}-figures`}
        {...(isAny ? { detail: budget } : {})}
      />
      {isAny ? (
        <Text fontSize="xs" color="inkSoft" mt="1.5" maxW="90ch">
          {uncertaintyWords(channel, settings)}
        </Text>
      ) : null}
    </FigureFrame>
  );
}

const budget = {
  label: 'Budget',
  name: (row: FigureRow) => `Uncertainty budget of ${row.name}`,
  of: (row: FigureRow) =>
    row.uncertainty ? <UncertaintyBudget of={row.uncertainty} unit={row.unit} name={row.name} /> : null,
};

function uncertaintyWords({ index }: ChannelAnalysis, { accuracy }: Settings): string {
  const isKnown = accuracy?.some(({ channel }) => channel === index) ?? false;
  const what = '±: expanded uncertainty, k = 2, a level of confidence of about 95 %.';
  return isKnown
    ? `${what} Accuracy and calibration of the measuring chain are in it as stated in the settings.`
    : `${what} It holds for the record alone: nothing is stated of the accuracy of the measuring chain. Analyse again to state it.`;
}
