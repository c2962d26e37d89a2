import { Link, Table, Text } from '@chakra-ui/react';
import type { LimitSet } from '@overtally/contracts';
import { Link as RouterLink } from 'react-router-dom';
import { Sheet } from '../../../components/sheet.js';
import { limitSetName } from '../../../lib/limit-set-name.js';
import { basisWords, confidenceWords, orderRange, quantityWords } from '../limit-words.js';

interface LimitSetTableProps {
  label: string;
  sets: readonly LimitSet[];
  setTo: (limitSetId: string) => string;
}

/** Limit sets with their edition, what they limit and how sure their values are. */
export function LimitSetTable({ label, sets, setTo }: LimitSetTableProps) {
  return (
    <Sheet overflowX="auto">
      <Table.Root size="md" aria-label={label}>
        <Table.Header>
          <Table.Row>
            <Table.ColumnHeader scope="col">Limit set</Table.ColumnHeader>
            <Table.ColumnHeader scope="col" w="13%">
              Quantity
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col" w="19%" hideBelow="md">
              Limits in
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col" w="14%" hideBelow="sm">
              Orders
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col" w="18%" hideBelow="lg">
              Confidence
            </Table.ColumnHeader>
          </Table.Row>
        </Table.Header>
        <Table.Body>
          {sets.map((set) => (
            <Table.Row key={set.id}>
              <Table.Cell>
                <Link asChild fontWeight="600">
                  <RouterLink to={setTo(set.id)}>{limitSetName(set)}</RouterLink>
                </Link>
                <Text color="inkSoft" fontSize="13px">
                  {set.edition ? `Edition ${set.edition}` : 'Edition not stated'}
                  {set.projectId === null ? null : `, version ${set.version}`}
                  {set.retiredAt ? ', retired' : null}
                </Text>
              </Table.Cell>
              <Table.Cell>{quantityWords[set.quantity]}</Table.Cell>
              <Table.Cell hideBelow="md">
                {set.basis === 'absolute' ? `${set.unit}, rms` : basisWords[set.basis]}
              </Table.Cell>
              <Table.Cell hideBelow="sm" whiteSpace="nowrap">
                {orderRange(set)}
              </Table.Cell>
              <Table.Cell hideBelow="lg" color={set.confidence === 'low' ? 'near' : 'inkSoft'}>
                {confidenceWords[set.confidence]}
              </Table.Cell>
            </Table.Row>
          ))}
        </Table.Body>
      </Table.Root>
    </Sheet>
  );
}
