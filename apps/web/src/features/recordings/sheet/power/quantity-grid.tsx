import { Box, chakra, Flex, Table } from '@chakra-ui/react';
import type { ReactNode } from 'react';
import { showQuantity, type PowerQuantity } from './quantities.js';

/** A quantity with its value. */
export interface GridEntry {
  quantity: PowerQuantity;
  value: number | null;
}

export interface GridRow {
  caption: ReactNode;
  /** Entries of each column. */
  cells: readonly (readonly GridEntry[])[];
}

interface QuantityGridProps {
  caption: string;
  columns: readonly string[];
  rows: readonly GridRow[];
}

/** A symbol with its subscript; its name on hovering and for screen readers. */
export function QuantitySymbol({ quantity }: { quantity: PowerQuantity }) {
  const { symbol, subscript, name } = quantity;
  const isRatio = subscript.includes('/');
  const [sub = '', rest = ''] = isRatio ? subscript.split('/') : [subscript];
  return (
    <chakra.abbr title={name} textDecoration="none" whiteSpace="nowrap" color="inkSoft">
      <i>{symbol}</i>
      {sub ? <Sub>{sub}</Sub> : null}
      {isRatio ? (
        <>
          /<i>{rest.charAt(0)}</i>
          <Sub>{rest.slice(1)}</Sub>
        </>
      ) : null}
    </chakra.abbr>
  );
}

const Sub = chakra('sub', { base: { fontSize: '0.75em', lineHeight: '0', bottom: '-0.25em' } });

/** Quantities grouped as the standard groups them: kinds down, parts across. */
export function QuantityGrid({ caption, columns, rows }: QuantityGridProps) {
  return (
    <Table.Root size="sm">
      <Table.Caption srOnly>{caption}</Table.Caption>
      <Table.Header>
        <Table.Row>
          <Table.ColumnHeader scope="col">
            <Box as="span" srOnly>
              Kind
            </Box>
          </Table.ColumnHeader>
          {columns.map((column) => (
            <Table.ColumnHeader key={column} scope="col" hideBelow="md">
              {column}
            </Table.ColumnHeader>
          ))}
        </Table.Row>
      </Table.Header>
      <Table.Body>
        {rows.map(({ caption: rowCaption, cells }, index) => (
          <Table.Row key={index} display={{ base: 'block', md: 'table-row' }}>
            <Table.ColumnHeader
              scope="row"
              fontSize="13px"
              textAlign="start"
              verticalAlign="top"
              display={{ base: 'block', md: 'table-cell' }}
              borderBottomWidth={{ base: '0', md: '1px' }}
              borderColor="rule"
            >
              {rowCaption}
            </Table.ColumnHeader>
            {cells.map((entries, column) => (
              <Table.Cell
                key={column}
                verticalAlign="top"
                py={{ base: '0.5', md: '1.5' }}
                display={{ base: entries.length > 0 ? 'block' : 'none', md: 'table-cell' }}
                borderBottomWidth={{ base: column === lastFilled(cells) ? '1px' : '0', md: '1px' }}
              >
                <Flex direction="column" gap="0.5">
                  {entries.map((entry) => (
                    <Entry key={entry.quantity.name} {...entry} />
                  ))}
                </Flex>
              </Table.Cell>
            ))}
          </Table.Row>
        ))}
      </Table.Body>
    </Table.Root>
  );
}

const lastFilled = (cells: GridRow['cells']) => cells.findLastIndex((entries) => entries.length > 0);

function Entry({ quantity, value }: GridEntry) {
  return (
    <Flex align="baseline" gap="3">
      <Box minW="14">
        <QuantitySymbol quantity={quantity} />
      </Box>
      <chakra.span fontFamily="mono" fontSize="13px" whiteSpace="nowrap">
        {showQuantity(value, quantity)}
      </chakra.span>
      <Box hideFrom="md" ml="auto" textAlign="end" fontSize="xs" color="inkSoft" aria-hidden="true">
        {quantity.name}
      </Box>
    </Flex>
  );
}
