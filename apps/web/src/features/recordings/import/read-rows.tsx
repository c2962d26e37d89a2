import { Box, Heading, Table, Text } from '@chakra-ui/react';
import type { ImportPreview } from '@overtally/contracts';
import { useId } from 'react';
import { none } from '../../../lib/format.js';

/** The same rows as they would be read. */
export function ReadRows({ preview }: { preview: ImportPreview }) {
  const id = useId();
  return (
    <Box minW="0">
      <Heading as="h3" id={id} fontSize="xs" color="inkSoft" fontWeight="400" mb="1">
        What will be read
      </Heading>
      <Box
        role="region"
        aria-labelledby={id}
        tabIndex={0}
        borderWidth="1px"
        borderColor="rule"
        borderRadius="3px"
        overflow="auto"
        maxH="260px"
      >
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
                    {column.index === preview.timeColumn ? ' · time' : ''}
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
      </Box>
    </Box>
  );
}
