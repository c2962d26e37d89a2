import { Box, Button, Flex, Table } from '@chakra-ui/react';
import { useMemo, useState } from 'react';
import { toCsv, toTsv } from '../lib/delimited.js';
import { saveText } from '../lib/save-file.js';
import { notifyDone, notifyProblem } from './notify.js';
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
  onSelect?: (row: Row) => void;
  /** Largest height before the rows scroll under their heading. */
  maxHeight?: string;
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
  } = props;
  const [sort, setSort] = useState<Sort>(initialSort);
  const sorted = useMemo(() => sortRows(rows, columns, sort), [rows, columns, sort]);
  const copy = () => {
    navigator.clipboard.writeText(toTsv(tableRows(fileColumns, sorted))).then(
      () => notifyDone(`Copied ${sorted.length} rows`),
      (error: unknown) => notifyProblem('Not copied', error),
    );
  };
  return (
    <Box>
      <Flex justify="flex-end" gap="2" mb="1">
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
      <Box overflow="auto" maxH={maxHeight} tabIndex={0} role="region" aria-label={caption}>
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
            </Table.Row>
          </Table.Header>
          <Table.Body>
            {sorted.map((row) => (
              <TwinRow key={rowKey(row)} row={row} {...props} />
            ))}
          </Table.Body>
        </Table.Root>
      </Box>
    </Box>
  );
}

function TwinRow<Row>({ row, columns, isSelected, onSelect }: TableTwinProps<Row> & { row: Row }) {
  return (
    <Table.Row
      bg={isSelected?.(row) ? 'wash' : undefined}
      cursor={onSelect ? 'pointer' : undefined}
      onClick={onSelect ? () => onSelect(row) : undefined}
    >
      {columns.map((column) => (
        <Table.Cell
          key={column.key}
          textAlign={column.align === 'right' ? 'end' : 'start'}
          fontFamily={column.align === 'right' ? 'mono' : undefined}
          fontSize={column.align === 'right' ? '13px' : undefined}
          color={column.tone?.(row)}
          fontWeight={column.tone?.(row) === 'over' ? '600' : undefined}
          whiteSpace="nowrap"
        >
          {column.show ? column.show(row) : (column.value(row) ?? '–')}
        </Table.Cell>
      ))}
    </Table.Row>
  );
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
