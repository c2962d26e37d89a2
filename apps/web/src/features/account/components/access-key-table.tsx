import { Table, Text } from '@chakra-ui/react';
import type { AccessKey } from '@overtally/contracts';
import { Sheet } from '../../../components/sheet.js';
import { formatDate, formatDateTime } from '../../../lib/format-date.js';
import { RemoveAccessKey } from './remove-access-key.js';

function expiry({ expiresAt }: AccessKey): string {
  if (expiresAt === null) return 'when removed';
  return Date.parse(expiresAt) > Date.now() ? formatDate(expiresAt) : `expired on ${formatDate(expiresAt)}`;
}

const lastUse = ({ lastUsedAt }: AccessKey) => (lastUsedAt ? formatDateTime(lastUsedAt) : 'not yet');

/** One's own access keys; the secret of none of them can be read again. */
export function AccessKeyTable({ keys }: { keys: readonly AccessKey[] }) {
  return (
    <Sheet overflowX="auto">
      <Table.Root>
        <Table.Caption srOnly>Access keys</Table.Caption>
        <Table.Header>
          <Table.Row>
            <Table.ColumnHeader scope="col">Name</Table.ColumnHeader>
            <Table.ColumnHeader scope="col" hideBelow="md">
              Begins with
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col" hideBelow="lg">
              Made
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col" hideBelow="md">
              Last used
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col">Ends</Table.ColumnHeader>
            <Table.ColumnHeader scope="col" textAlign="end">
              Remove
            </Table.ColumnHeader>
          </Table.Row>
        </Table.Header>
        <Table.Body>
          {keys.map((key) => (
            <Table.Row key={key.id}>
              <Table.Cell overflowWrap="anywhere">
                {key.name}
                <Text hideFrom="md" color="inkSoft" fontSize="13px">
                  {key.prefix}…, last used: {lastUse(key)}
                </Text>
              </Table.Cell>
              <Table.Cell hideBelow="md" fontFamily="mono" fontSize="13px">
                {key.prefix}…
              </Table.Cell>
              <Table.Cell hideBelow="lg" color="inkSoft" whiteSpace="nowrap">
                {formatDate(key.createdAt)}
              </Table.Cell>
              <Table.Cell hideBelow="md" color="inkSoft" whiteSpace="nowrap">
                {lastUse(key)}
              </Table.Cell>
              <Table.Cell>{expiry(key)}</Table.Cell>
              <Table.Cell textAlign="end">
                <RemoveAccessKey accessKey={key} />
              </Table.Cell>
            </Table.Row>
          ))}
        </Table.Body>
      </Table.Root>
    </Sheet>
  );
}
