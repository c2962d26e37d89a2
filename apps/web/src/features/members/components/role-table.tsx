import { Table, VisuallyHidden } from '@chakra-ui/react';
import { holds } from '@overtally/contracts';
import { Sheet } from '../../../components/sheet.js';
import { duties, roleLabels, roles } from '../role-words.js';

/** What each role may do, from the same table that the server decides by. */
export function RoleTable() {
  return (
    <Sheet overflowX="auto" tabIndex={0} role="region" aria-label="What each role may do">
      <Table.Root size="sm">
        <Table.Caption srOnly>What each role may do</Table.Caption>
        <Table.Header>
          <Table.Row>
            <Table.ColumnHeader scope="col">May</Table.ColumnHeader>
            {roles.map((role) => (
              <Table.ColumnHeader key={role} scope="col" textAlign="center" w={{ md: '28' }}>
                {roleLabels[role]}
              </Table.ColumnHeader>
            ))}
          </Table.Row>
        </Table.Header>
        <Table.Body>
          {duties.map(({ permission, label }) => (
            <Table.Row key={permission}>
              <Table.Cell as="th" scope="row" fontWeight="400" textAlign="start">
                {label}
              </Table.Cell>
              {roles.map((role) => (
                <Table.Cell key={role} textAlign="center">
                  <Mark held={holds(permission, role)} />
                </Table.Cell>
              ))}
            </Table.Row>
          ))}
        </Table.Body>
      </Table.Root>
    </Sheet>
  );
}

function Mark({ held }: { held: boolean }) {
  return (
    <>
      <span aria-hidden="true">{held ? '✓' : '–'}</span>
      <VisuallyHidden>{held ? 'yes' : 'no'}</VisuallyHidden>
    </>
  );
}
