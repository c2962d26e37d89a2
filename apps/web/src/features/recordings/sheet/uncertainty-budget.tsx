import { Box, Table, Text } from '@chakra-ui/react';
import type { Uncertainty } from '@overtally/contracts';
import { formatPercent } from '../../../lib/format.js';
import { formatUncertainty } from '../../../lib/format-uncertainty.js';

const sources: Record<Uncertainty['contributors'][number]['source'], string> = {
  calibration: 'Calibration of the measuring chain',
  accuracy: 'Accuracy of the instrument',
  quantisation: 'Quantisation',
  noise: 'Noise',
  synchronisation: 'Synchronisation of the windows',
  fit: 'Fit of the frequency',
};

const digitCell = { textAlign: 'end', fontFamily: 'mono', fontSize: '13px' } as const;

/** What an expanded uncertainty is made of, the largest contributor first (JCGM 100:2008, 5.1 and 6.2). */
export function UncertaintyBudget({ of, unit, name }: { of: Uncertainty; unit: string; name: string }) {
  const variance = of.contributors.reduce((sum, { standard }) => sum + standard ** 2, 0);
  return (
    <Box maxW="34rem" py="1">
      <Table.Root size="sm" variant="line">
        <Table.Caption srOnly>Uncertainty budget of {name}</Table.Caption>
        <Table.Header>
          <Table.Row>
            <Table.ColumnHeader scope="col">Source</Table.ColumnHeader>
            <Table.ColumnHeader scope="col" textAlign="end">
              Standard uncertainty u
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col" textAlign="end">
              Share of u²
            </Table.ColumnHeader>
          </Table.Row>
        </Table.Header>
        <Table.Body>
          {of.contributors.map(({ source, standard }) => (
            <Table.Row key={source}>
              <Table.Cell>{sources[source]}</Table.Cell>
              <Table.Cell {...digitCell}>{formatUncertainty(standard, unit)}</Table.Cell>
              <Table.Cell {...digitCell}>
                {formatPercent(variance > 0 ? (100 * standard ** 2) / variance : null)}
              </Table.Cell>
            </Table.Row>
          ))}
        </Table.Body>
      </Table.Root>
      <Text fontSize="xs" color="inkSoft" pt="1.5" px="3">
        Combined by root sum of squares; U = {of.coverageFactor}·u = {formatUncertainty(of.expanded, unit)}.
      </Text>
    </Box>
  );
}
