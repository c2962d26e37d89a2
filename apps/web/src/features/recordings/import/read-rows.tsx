import { Table, Text } from '@chakra-ui/react';
import type { ImportPreview } from '@overtally/contracts';
import { none } from '../../../lib/format.js';
import { PreviewFrame } from './preview-frame.js';

/** The same rows as they would be read. */
export function ReadRows({ preview }: { preview: ImportPreview }) {
  return (
    <PreviewFrame title="What will be read">
      {preview.rows.length === 0 ? (
        <Text color="inkSoft" fontSize="13px" p="3">
          No rows of numbers to show.
        </Text>
      ) : (
        <Table.Root size="sm" fontSize="xs" stickyHeader>
          <Table.Header>
            <Table.Row bg="sheet">
              {preview.columns.map((column) => (
                <Table.ColumnHeader key={column.index} scope="col" textAlign="end">
                  {column.name}
                  {column.unit ? ` (${column.unit})` : ''}
                  {preview.clockColumns.includes(column.index) ? ' · time' : ''}
                </Table.ColumnHeader>
              ))}
            </Table.Row>
          </Table.Header>
          <Table.Body>
            {preview.rows.map((row, rowIndex) => (
              // Rows of a file have no other name than their place.
              <Table.Row key={rowIndex}>
                {row.map((cell, cellIndex) => (
                  <Table.Cell
                    key={cellIndex}
                    textAlign="end"
                    fontFamily="mono"
                    whiteSpace="nowrap"
                    color={typeof cell === 'number' ? undefined : 'near'}
                  >
                    {cell ?? none}
                  </Table.Cell>
                ))}
              </Table.Row>
            ))}
          </Table.Body>
        </Table.Root>
      )}
    </PreviewFrame>
  );
}
