import { Box, Table, Text } from '@chakra-ui/react';
import type { User } from '@overtally/contracts';
import { Sheet } from '../../../components/sheet.js';
import { formatDate } from '../../../lib/format-date.js';
import { UserMenu } from './user-menu.js';

interface UserTableProps {
  users: readonly User[];
  /** Id of the signed-in administrator, who cannot disable themselves here. */
  ownId: string;
}

const standing = (user: User) => {
  if (user.disabledAt) return `disabled on ${formatDate(user.disabledAt)}`;
  return user.isAdministrator ? 'administrator' : 'active';
};

/** Every account of the installation. */
export function UserTable({ users, ownId }: UserTableProps) {
  return (
    <Sheet overflowX="auto">
      <Table.Root>
        <Table.Caption srOnly>People</Table.Caption>
        <Table.Header>
          <Table.Row>
            <Table.ColumnHeader scope="col">Name</Table.ColumnHeader>
            <Table.ColumnHeader scope="col" hideBelow="md">
              E-mail
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col" hideBelow="lg">
              Since
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col">Standing</Table.ColumnHeader>
            <Table.ColumnHeader scope="col" textAlign="end">
              Change
            </Table.ColumnHeader>
          </Table.Row>
        </Table.Header>
        <Table.Body>
          {users.map((user) => (
            <Table.Row key={user.id} color={user.disabledAt ? 'inkSoft' : undefined}>
              <Table.Cell>
                {user.name}
                {user.id === ownId ? (
                  <Box as="span" color="inkSoft">
                    {' '}
                    (you)
                  </Box>
                ) : null}
                <Text hideFrom="md" color="inkSoft" fontSize="13px" overflowWrap="anywhere">
                  {user.email}
                </Text>
              </Table.Cell>
              <Table.Cell hideBelow="md">{user.email}</Table.Cell>
              <Table.Cell hideBelow="lg" color="inkSoft" whiteSpace="nowrap">
                {formatDate(user.createdAt)}
              </Table.Cell>
              <Table.Cell fontWeight={user.isAdministrator && !user.disabledAt ? '600' : '400'}>
                {standing(user)}
              </Table.Cell>
              <Table.Cell textAlign="end">
                <UserMenu user={user} isOwn={user.id === ownId} />
              </Table.Cell>
            </Table.Row>
          ))}
        </Table.Body>
      </Table.Root>
    </Sheet>
  );
}
