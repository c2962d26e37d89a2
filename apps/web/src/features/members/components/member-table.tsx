import { Box, Table, Text } from '@chakra-ui/react';
import type { Member } from '@overtally/contracts';
import { Sheet } from '../../../components/sheet.js';
import { formatDate } from '../../../lib/format-date.js';
import { roleLabels } from '../role-words.js';
import { MemberActions } from './member-actions.js';

interface MemberTableProps {
  projectId: string;
  members: readonly Member[];
  /** Id of the signed-in person. */
  ownId: string;
  mayManage: boolean;
}

/** Who works in the project, and as what. */
export function MemberTable({ projectId, members, ownId, mayManage }: MemberTableProps) {
  return (
    <Sheet overflowX="auto">
      <Table.Root>
        <Table.Caption srOnly>Members</Table.Caption>
        <Table.Header>
          <Table.Row>
            <Table.ColumnHeader scope="col">Name</Table.ColumnHeader>
            <Table.ColumnHeader scope="col" hideBelow="md">
              E-mail
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col" hideBelow="lg">
              Member since
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col">Role</Table.ColumnHeader>
          </Table.Row>
        </Table.Header>
        <Table.Body>
          {members.map((member) => (
            <Table.Row key={member.userId}>
              <Table.Cell>
                {member.name}
                {member.userId === ownId ? (
                  <Box as="span" color="inkSoft">
                    {' '}
                    (you)
                  </Box>
                ) : null}
                <Text hideFrom="md" color="inkSoft" fontSize="13px" overflowWrap="anywhere">
                  {member.email}
                </Text>
              </Table.Cell>
              <Table.Cell hideBelow="md">{member.email}</Table.Cell>
              <Table.Cell hideBelow="lg" color="inkSoft" whiteSpace="nowrap">
                {formatDate(member.addedAt)}
              </Table.Cell>
              <Table.Cell>
                {mayManage ? (
                  <MemberActions projectId={projectId} member={member} />
                ) : (
                  roleLabels[member.role]
                )}
              </Table.Cell>
            </Table.Row>
          ))}
        </Table.Body>
      </Table.Root>
    </Sheet>
  );
}
