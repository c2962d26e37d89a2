import { Box, Button, Heading, Table, Text } from '@chakra-ui/react';
import type { ImportPreview, PreviewSignal } from '@overtally/contracts';
import { useId, useState } from 'react';
import { scaledLike, sharesUnit, unitOf, type ColumnDraft } from './column-draft.js';
import { ColumnRow, TimeRow } from './column-row.js';
import {
  columnKey,
  fieldsOf,
  keptColumns,
  timeIndex,
  type ImportDraft,
  type ImportFaults,
} from './import-draft.js';

interface ColumnFieldsProps {
  draft: ImportDraft;
  faults: ImportFaults;
  preview: ImportPreview;
  /** Channels as they would be read: they know what a unit stands for. */
  signals: readonly PreviewSignal[];
  /** `index` is that of the column that was touched. */
  onChange: (columns: ImportDraft['columns'], index: number) => void;
}

/** Rows shown at first; a table of several hundred columns opens on request. */
const rowsAtFirst = 16;

/** Which columns become channels, and how their values are scaled. */
export function ColumnFields({ draft, faults, preview, signals, onChange }: ColumnFieldsProps) {
  const id = useId();
  const [showsAll, setShowsAll] = useState(false);
  const { columns } = preview;
  if (columns.length === 0) return null;
  const time = timeIndex(draft, preview);
  const kept = keptColumns(draft, preview);
  const hasFullScale =
    preview.format === 'wav' || kept.some((column) => column.draft.fullScale.trim() !== '');
  const set = (touched: number, changes: readonly (readonly [number, ColumnDraft])[]) =>
    onChange(
      {
        ...draft.columns,
        ...Object.fromEntries(changes.map(([index, fields]) => [columnKey(index), fields])),
      },
      touched,
    );
  const shown = showsAll ? columns : columns.slice(0, rowsAtFirst);
  const headings = [
    'Read',
    'Name',
    'Quantity',
    'Unit',
    'Probe ratio',
    ...(hasFullScale ? ['Input at full scale'] : []),
    'Gain',
    'Offset',
    'Inverted',
    '',
  ];
  return (
    <Box>
      <Heading as="h3" id={id} fontSize="sm" mb="1">
        Channels
      </Heading>
      <Text color="inkSoft" fontSize="13px" mb="1">
        Value = sign × probe ratio × {hasFullScale ? 'full scale × ' : ''}gain × number in the file + offset
      </Text>
      {kept.length === 0 ? (
        <Text role="alert" color="over" fontSize="13px">
          Read at least one column.
        </Text>
      ) : null}
      <Box role="region" aria-labelledby={id} tabIndex={0} overflow="auto" maxH={{ md: '340px' }} mx="-1.5">
        <Table.Root size="sm" css={stackedWhereNarrow}>
          <Table.Header>
            <Table.Row>
              {headings.map((heading) => (
                <Table.ColumnHeader key={heading} scope="col" px="1.5">
                  {heading || <Box srOnly>Apply to others</Box>}
                </Table.ColumnHeader>
              ))}
            </Table.Row>
          </Table.Header>
          <Table.Body>
            {shown.map((column) => {
              const { index } = column;
              if (index === time) return <TimeRow key={index} column={column} span={headings.length - 2} />;
              const fields = fieldsOf(draft, column, preview);
              const alike = kept.filter(
                (other) => other.column.index !== index && sharesUnit({ column, draft: fields }, other),
              );
              return (
                <ColumnRow
                  key={index}
                  column={column}
                  isClock={preview.clockColumns.includes(index)}
                  hasFullScale={hasFullScale}
                  fields={fields}
                  faults={faults.columns[columnKey(index)] ?? {}}
                  quantity={signals.find((signal) => signal.column === index)?.quantity ?? column.quantity}
                  alike={alike.length}
                  unit={unitOf(column, fields)}
                  onChange={(change) => set(index, [[index, change]])}
                  onApplyToAlike={() =>
                    set(
                      index,
                      [{ column, draft: fields }, ...alike].map(
                        (other) => [other.column.index, scaledLike(other.draft, fields)] as const,
                      ),
                    )
                  }
                />
              );
            })}
          </Table.Body>
        </Table.Root>
        {shown.length < columns.length ? (
          <Button size="xs" m="3" onClick={() => setShowsAll(true)}>
            Show the other {columns.length - shown.length} columns
          </Button>
        ) : null}
      </Box>
    </Box>
  );
}

/** On narrow screens each column is a block, with the captions over its fields. */
const stackedWhereNarrow = {
  '@media (max-width: 47.99em)': {
    '& thead': { position: 'absolute', width: '1px', height: '1px', overflow: 'hidden', opacity: 0 },
    '& tbody tr': {
      display: 'grid',
      gridTemplateColumns: '1fr 1fr',
      borderBottomWidth: '1px',
      borderColor: 'rule',
      paddingBlock: '2',
    },
    '& tbody td': { borderBottomWidth: '0', paddingBlock: '1' },
    '& tbody td[data-caption]::before': {
      content: 'attr(data-caption)',
      display: 'block',
      fontSize: 'xs',
      color: 'inkSoft',
    },
    '& tbody td[data-whole]': { gridColumn: '1 / -1' },
    '& tbody td[data-whole]:empty, & tbody tr[data-unread] td[data-caption]': { display: 'none' },
  },
};
