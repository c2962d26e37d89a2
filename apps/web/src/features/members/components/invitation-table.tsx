import { Button, Flex, Table, Text } from '@chakra-ui/react';
import type { Invitation } from '@overtally/contracts';
import { useState } from 'react';
import { ConfirmDialog } from '../../../components/confirm-dialog.js';
import { MailStanding } from '../../../components/mail-standing.js';
import { notifyDone, notifyProblem } from '../../../components/notify.js';
import { Sheet } from '../../../components/sheet.js';
import { formatDateTime } from '../../../lib/format-date.js';
import { useInvitationChanges } from '../hooks/use-invitation-changes.js';
import { roleLabels } from '../role-words.js';

interface InvitationTableProps {
  projectId: string;
  invitations: readonly Invitation[];
}

/** Who was invited, as what, and what became of it. */
export function InvitationTable({ projectId, invitations }: InvitationTableProps) {
  return (
    <Sheet overflowX="auto">
      <Table.Root>
        <Table.Caption srOnly>Invitations</Table.Caption>
        <Table.Header>
          <Table.Row>
            <Table.ColumnHeader scope="col">Invited</Table.ColumnHeader>
            <Table.ColumnHeader scope="col">Standing</Table.ColumnHeader>
            <Table.ColumnHeader scope="col" hideBelow="md">
              Message
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col" textAlign="end">
              Change
            </Table.ColumnHeader>
          </Table.Row>
        </Table.Header>
        <Table.Body>
          {invitations.map((invitation) => (
            <Table.Row key={invitation.id} color={invitation.state === 'open' ? undefined : 'inkSoft'}>
              <Table.Cell verticalAlign="top">
                <Text overflowWrap="anywhere">{invitation.email}</Text>
                <Text color="inkSoft" fontSize="13px">
                  {roleLabels[invitation.role]}, by {invitation.invitedBy.name}
                </Text>
              </Table.Cell>
              <Table.Cell verticalAlign="top">{standing(invitation)}</Table.Cell>
              <Table.Cell verticalAlign="top" hideBelow="md">
                {invitation.mail ? <MailStanding mail={invitation.mail} /> : null}
              </Table.Cell>
              <Table.Cell verticalAlign="top" textAlign="end">
                {invitation.state === 'open' ? (
                  <InvitationActions projectId={projectId} invitation={invitation} />
                ) : null}
              </Table.Cell>
            </Table.Row>
          ))}
        </Table.Body>
      </Table.Root>
    </Sheet>
  );
}

function standing({ state, acceptedAt, expiresAt }: Invitation): string {
  switch (state) {
    case 'open':
      return `open until ${formatDateTime(expiresAt)}`;
    case 'accepted':
      return `accepted ${formatDateTime(acceptedAt)}`;
    case 'expired':
      return `expired ${formatDateTime(expiresAt)}`;
    case 'revoked':
      return 'taken back';
  }
}

function InvitationActions({ projectId, invitation }: { projectId: string; invitation: Invitation }) {
  const [asking, setAsking] = useState(false);
  const { revoke, sendAgain } = useInvitationChanges(projectId);
  const { id, email, mail } = invitation;
  const send = (mailId: string) =>
    void sendAgain.mutateAsync(mailId).then(
      () => notifyDone(`The message to ${email} is sent again`),
      (error: unknown) => notifyProblem('Not sent again', error),
    );
  const takeBack = () =>
    void revoke
      .mutateAsync(id)
      .then(
        () => notifyDone(`Invitation of ${email} taken back`),
        (error: unknown) => notifyProblem('Not taken back', error),
      )
      .finally(() => setAsking(false));
  return (
    <Flex gap="1" justify="flex-end" wrap="wrap">
      {mail && mail.status !== 'sent' && mail.attempts > 0 ? (
        <Button size="xs" aria-label={`Send now to ${email}`} onClick={() => send(mail.id)}>
          Send now
        </Button>
      ) : null}
      <Button size="xs" aria-label={`Take back the invitation of ${email}`} onClick={() => setAsking(true)}>
        Take back
      </Button>
      <ConfirmDialog
        open={asking}
        onClose={() => setAsking(false)}
        title={`Take back the invitation of ${email}?`}
        confirmLabel="Take back"
        destructive
        pending={revoke.isPending}
        onConfirm={takeBack}
      >
        The link in the message stops working. You can invite again.
      </ConfirmDialog>
    </Flex>
  );
}
