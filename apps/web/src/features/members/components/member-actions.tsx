import { Button, Flex } from '@chakra-ui/react';
import { projectRoleSchema, type Member, type ProjectRole } from '@overtally/contracts';
import { useState } from 'react';
import { ConfirmDialog } from '../../../components/confirm-dialog.js';
import { SelectInput } from '../../../components/form-field.js';
import { notifyDone, notifyProblem } from '../../../components/notify.js';
import { useMemberChanges } from '../hooks/use-member-changes.js';
import { roleLabels, roleOptions } from '../role-words.js';

interface MemberActionsProps {
  projectId: string;
  member: Member;
}

/** Changes the role of a member, or removes the member; both can be undone. */
export function MemberActions({ projectId, member }: MemberActionsProps) {
  const [asking, setAsking] = useState(false);
  const { add, changeRole, remove } = useMemberChanges(projectId);

  const setRole = (role: ProjectRole, undoTo: ProjectRole | null) =>
    changeRole.mutate(
      { member, role },
      {
        onSuccess: () =>
          notifyDone(
            `${member.name} is now ${roleLabels[role].toLowerCase()}`,
            undoTo ? () => setRole(undoTo, null) : undefined,
          ),
        onError: (error) => notifyProblem(`Role of ${member.name} not changed`, error),
      },
    );
  const bringBack = () =>
    add.mutateAsync({ email: member.email, role: member.role }).then(
      () => notifyDone(`${member.name} is a member again`),
      (error: unknown) => notifyProblem(`${member.name} not brought back`, error),
    );
  // A promise, since the row and its callbacks are gone once the list is renewed.
  const removeNow = () =>
    void remove
      .mutateAsync(member)
      .then(
        () => notifyDone(`${member.name} removed`, () => void bringBack()),
        (error: unknown) => notifyProblem(`${member.name} not removed`, error),
      )
      .finally(() => setAsking(false));
  return (
    <Flex gap={{ base: '1', md: '2' }} direction={{ base: 'column', md: 'row' }} align={{ md: 'center' }}>
      <SelectInput
        aria-label={`Role of ${member.name}`}
        width="9rem"
        options={roleOptions}
        value={member.role}
        onChange={(event) => setRole(projectRoleSchema.parse(event.target.value), member.role)}
      />
      <Button variant="ghost" aria-label={`Remove ${member.name}`} onClick={() => setAsking(true)}>
        Remove
      </Button>
      <ConfirmDialog
        open={asking}
        onClose={() => setAsking(false)}
        title={`Remove ${member.name}?`}
        confirmLabel={`Remove ${member.name}`}
        destructive
        pending={remove.isPending}
        onConfirm={removeNow}
      >
        {member.name} will no longer see this project. Notes, verdicts and reports keep the name.
      </ConfirmDialog>
    </Flex>
  );
}
