import { Button, Text } from '@chakra-ui/react';
import type { LimitSet } from '@overtally/contracts';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { ConfirmDialog } from '../../../components/confirm-dialog.js';
import { notifyDone, notifyProblem } from '../../../components/notify.js';
import { deleteLimitSet } from '../api/delete-limit-set.js';

/** Takes a custom set, or its newest version, away after asking. */
export function DeleteLimitSet({ set, onDeleted }: { set: LimitSet; onDeleted: () => void }) {
  const queryClient = useQueryClient();
  const [asking, setAsking] = useState(false);
  const remove = useMutation({
    mutationFn: () => deleteLimitSet(set.id),
    onSuccess: () => {
      notifyDone(`${set.title} deleted`);
      onDeleted();
      return queryClient.invalidateQueries({ queryKey: ['limit-sets'], refetchType: 'none' });
    },
    onError: (error) => notifyProblem('Not deleted', error),
    onSettled: () => setAsking(false),
  });
  return (
    <>
      <Button colorPalette="over" onClick={() => setAsking(true)}>
        Delete
      </Button>
      <ConfirmDialog
        open={asking}
        onClose={() => setAsking(false)}
        title={set.version > 1 ? `Delete version ${set.version} of ${set.title}?` : `Delete ${set.title}?`}
        confirmLabel="Delete the limit set"
        destructive
        pending={remove.isPending}
        onConfirm={() => remove.mutate()}
      >
        <Text>
          Nobody will be able to judge by it any more. Verdicts already made keep their own copy of the
          limits. This cannot be taken back.
        </Text>
      </ConfirmDialog>
    </>
  );
}
