import { Button, Flex } from '@chakra-ui/react';
import type { ReadingRule } from '@overtally/contracts';
import { useState } from 'react';
import { ConfirmDialog } from '../../../components/confirm-dialog.js';
import { notifyDone, notifyProblem } from '../../../components/notify.js';
import { useRuleChanges } from '../hooks/use-rule-changes.js';
import { RuleDialog } from './rule-dialog.js';

/** Changes a rule, or deletes it. */
export function RuleActions({ projectId, rule }: { projectId: string; rule: ReadingRule }) {
  const [asked, setAsked] = useState<'edit' | 'delete' | null>(null);
  const close = () => setAsked(null);
  const { remove } = useRuleChanges(projectId);
  // A promise, since the row and its callbacks are gone once the list is renewed.
  const removeNow = () =>
    void remove
      .mutateAsync(rule.id)
      .then(
        () => notifyDone(`“${rule.name}” deleted`),
        (error: unknown) => notifyProblem(`“${rule.name}” was not deleted`, error),
      )
      .finally(close);
  return (
    <Flex gap="1" justify="flex-end" wrap="wrap">
      <Button variant="ghost" aria-label={`Edit ${rule.name}`} onClick={() => setAsked('edit')}>
        Edit
      </Button>
      <Button variant="ghost" aria-label={`Delete ${rule.name}`} onClick={() => setAsked('delete')}>
        Delete
      </Button>
      <RuleDialog projectId={projectId} rule={rule} open={asked === 'edit'} onClose={close} />
      <ConfirmDialog
        open={asked === 'delete'}
        onClose={close}
        title={`Delete “${rule.name}”?`}
        confirmLabel="Delete the rule"
        destructive
        pending={remove.isPending}
        onConfirm={removeNow}
      >
        New files are no longer read by it. Recordings that were keep their settings and its name.
      </ConfirmDialog>
    </Flex>
  );
}
