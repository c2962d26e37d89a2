import { Button, Stack, Text } from '@chakra-ui/react';
import type { CreateInvitation } from '@overtally/contracts';
import { FormProblem } from '../../../components/form-problem.js';
import { Modal } from '../../../components/modal.js';
import { notifyDone } from '../../../components/notify.js';
import { problemText } from '../../../lib/api-problem.js';
import { useInvitationChanges } from '../hooks/use-invitation-changes.js';
import { roleLabels } from '../role-words.js';

interface InviteDialogProps {
  projectId: string;
  /** Whom to invite; null closes the dialog. */
  wanted: CreateInvitation | null;
  onClose: () => void;
  onInvited: () => void;
}

/** Offers to invite an address that has no account. */
export function InviteDialog({ projectId, wanted, onClose, onInvited }: InviteDialogProps) {
  const { invite } = useInvitationChanges(projectId);
  const close = () => {
    invite.reset();
    onClose();
  };
  const send = (input: CreateInvitation) =>
    invite.mutate(input, {
      onSuccess: ({ email }) => {
        notifyDone(`${email} invited`);
        onInvited();
        close();
      },
    });
  return (
    <Modal
      open={wanted !== null}
      onClose={close}
      title="Invite by e-mail?"
      footer={
        wanted ? (
          <>
            <Button onClick={close}>Cancel</Button>
            <Button variant="solid" loading={invite.isPending} onClick={() => send(wanted)}>
              Send the invitation
            </Button>
          </>
        ) : null
      }
    >
      {wanted ? (
        <Stack gap="3">
          <FormProblem message={invite.isError ? problemText(invite.error) : undefined} />
          <Text>
            No account has the address {wanted.email}. A message with a link invites its reader to make one
            and to work here as {roleLabels[wanted.role].toLowerCase()}. The link works once, for 14 days.
          </Text>
        </Stack>
      ) : null}
    </Modal>
  );
}
