import { Box, Button, chakra, Flex, Table, Text } from '@chakra-ui/react';
import { useId, useMemo, useRef, useState, type ReactNode } from 'react';
import { toCsv, toTsv } from '../lib/delimited.js';
import { saveText } from '../lib/save-file.js';
import { notifyDone, notifyProblem } from './notify.js';
import { hiddenWords, useHiddenRows } from './use-hidden-rows.js';
import { SortButton, type Sort } from './sort-button.js';
import { compareCells, tableRows, type TableColumn } from './table-column.js';

interface TableTwinProps<Row> {
  /** Names the table for screen readers. */
  caption: string;
  columns: readonly TableColumn<Row>[];
  /** Columns of files and the clipboard, where they differ from those shown. */
  fileColumns?: readonly TableColumn<Row>[];
  rows: readonly Row[];
  rowKey: (row: Row) => string | number;
  /** Name of the downloaded file without its ending. */
  fileName: string;
  initialSort?: Sort;
  /** Rows to be seen as selected. */
  isSelected?: (row: Row) => boolean;
  /** Makes rows selectable: by a click anywhere, and by a button in the first cell. */
  onSelect?: (row: Row) => void;
  /** Largest height before the rows scroll under their heading. */
  maxHeight?: string;
  /** What opens under a row, behind a button in its last cell; `of` null: nothing for this row. */
  detail?: {
    /** Word on the button. */
    label: string;
    /** Name of the button for screen readers. */
    name: (row: Row) => string;
    of: (row: Row) => ReactNode | null;
  };
}

/** The numbers behind a figure: sortable, to copy as tab-separated text, to download as CSV. */
export function TableTwin<Row>(props: TableTwinProps<Row>) {
  const {
    caption,
    columns,
    fileColumns = columns,
    rows,
    rowKey,
    fileName,
    initialSort = null,
    maxHeight,
    detail,
  } = props;
  const box = useRef<HTMLDivElement>(null);
  const [sort, setSort] = useState<Sort>(initialSort);
  const sorted = useMemo(() => sortRows(rows, columns, sort), [rows, columns, sort]);
  const hidden = hiddenWords(useHiddenRows(box, sorted.length));
  const copy = () => {
    navigator.clipboard.writeText(toTsv(tableRows(fileColumns, sorted))).then(
      () => notifyDone(`Copied ${sorted.length} rows`),
      (error: unknown) => notifyProblem('Not copied', error),
    );
  };
  return (
    <Box>
      <Flex justify="flex-end" align="center" gap="2" mb="1">
        <Text fontSize="xs" color="inkSoft" mr="auto">
          {sorted.length === 1 ? '1 row' : `${sorted.length} rows`}
        </Text>
        <Button size="xs" variant="ghost" colorPalette="act" onClick={copy}>
          Copy
        </Button>
        <Button
          size="xs"
          variant="ghost"
          colorPalette="act"
          onClick={() => saveText(`${fileName}.csv`, toCsv(tableRows(fileColumns, sorted)))}
        >
          Download CSV
        </Button>
      </Flex>
      <Box ref={box} overflow="auto" maxH={maxHeight} tabIndex={0} role="region" aria-label={caption}>
        <Table.Root size="sm" stickyHeader={maxHeight !== undefined}>
          <Table.Caption srOnly>{caption}</Table.Caption>
          <Table.Header>
            <Table.Row>
              {columns.map((column) => (
                <Table.ColumnHeader
                  key={column.key}
                  scope="col"
                  textAlign={column.align === 'right' ? 'end' : 'start'}
                  aria-sort={ariaSort(sort, column.key)}
                >
                  <SortButton column={column.key} sort={sort} onSort={setSort}>
                    {column.header}
                  </SortButton>
                </Table.ColumnHeader>
              ))}
              {detail ? <Table.ColumnHeader scope="col" aria-label={detail.label} /> : null}
            </Table.Row>
          </Table.Header>
          <Table.Body>
            {sorted.map((row) => (
              <TwinRow key={rowKey(row)} row={row} {...props} />
            ))}
          </Table.Body>
        </Table.Root>
      </Box>
      {hidden ? (
        <Text
          fontSize="xs"
          color="inkSoft"
          textAlign="center"
          borderTopWidth="1px"
          borderColor="rule"
          pt="1"
          aria-hidden="true"
        >
          {hidden}
        </Text>
      ) : null}
    </Box>
  );
}

function TwinRow<Row>(props: TableTwinProps<Row> & { row: Row }) {
  const { row, columns, detail, isSelected, onSelect } = props;
  const [open, setOpen] = useState(false);
  const id = useId();
  const content = detail?.of(row) ?? null;
  return (
    <>
      <Table.Row
        bg={isSelected?.(row) ? 'wash' : undefined}
        cursor={onSelect ? 'pointer' : undefined}
        onClick={onSelect ? () => onSelect(row) : undefined}
      >
        {columns.map((column, index) => (
          <Table.Cell
            key={column.key}
            textAlign={column.align === 'right' ? 'end' : 'start'}
            fontFamily={column.align === 'right' ? 'mono' : undefined}
            fontSize={column.align === 'right' ? '13px' : undefined}
            color={column.tone?.(row)}
            fontWeight={column.tone?.(row) === 'over' ? '600' : undefined}
            whiteSpace="nowrap"
          >
            {onSelect && index === 0 ? (
              <chakra.button
                type="button"
                color="act"
                cursor="pointer"
                minW="6"
                textAlign="inherit"
                aria-pressed={isSelected?.(row) ?? false}
                onClick={(event) => {
                  event.stopPropagation();
                  onSelect(row);
                }}
              >
                {shownCell(column, row)}
              </chakra.button>
            ) : (
              shownCell(column, row)
            )}
          </Table.Cell>
        ))}
        {detail ? (
          <Table.Cell textAlign="end" py="0">
            {content === null ? null : (
              <Button
                size="2xs"
                variant="ghost"
                aria-label={detail.name(row)}
                aria-expanded={open}
                aria-controls={id}
                onClick={() => setOpen(!open)}
              >
                {detail.label}
              </Button>
            )}
          </Table.Cell>
        ) : null}
      </Table.Row>
      {open && content !== null ? (
        <Table.Row id={id}>
          <Table.Cell colSpan={columns.length + 1} bg="paper">
            {content}
          </Table.Cell>
        </Table.Row>
      ) : null}
    </>
  );
}

function shownCell<Row>(column: TableColumn<Row>, row: Row): ReactNode {
  return column.show ? column.show(row) : (column.value(row) ?? '–');
}

function sortRows<Row>(
  rows: readonly Row[],
  columns: readonly TableColumn<Row>[],
  sort: Sort,
): readonly Row[] {
  const column = columns.find((candidate) => candidate.key === sort?.key);
  if (!column || !sort) return rows;
  return rows.toSorted((a, b) => compareCells(column.value(a), column.value(b), sort.descending));
}

function ariaSort(sort: Sort, key: string): 'ascending' | 'descending' | 'none' {
  if (sort?.key !== key) return 'none';
  return sort.descending ? 'descending' : 'ascending';
}
