import { Button, Text } from '@chakra-ui/react';
import type { LimitSet } from '@overtally/contracts';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { ConfirmDialog } from '../../../components/confirm-dialog.js';
import { notifyDone, notifyProblem } from '../../../components/notify.js';
import { updateLimitSet } from '../api/update-limit-set.js';

/** Takes a custom set out of what is offered for new verdicts, after asking; or brings it back. */
export function RetireLimitSet({ set }: { set: LimitSet }) {
  const queryClient = useQueryClient();
  const [asking, setAsking] = useState(false);
  const isRetired = set.retiredAt !== undefined;
  const change = useMutation({
    mutationFn: () => updateLimitSet(set.id, { retired: !isRetired }),
    onSuccess: () => {
      notifyDone(isRetired ? `${set.title} is offered again` : `${set.title} retired`);
      return queryClient.invalidateQueries({ queryKey: ['limit-sets'] });
    },
    onError: (error) => notifyProblem('Not changed', error),
    onSettled: () => setAsking(false),
  });
  if (isRetired) {
    return (
      <Button loading={change.isPending} onClick={() => change.mutate()}>
        Bring back
      </Button>
    );
  }
  return (
    <>
      <Button onClick={() => setAsking(true)}>Retire</Button>
      <ConfirmDialog
        open={asking}
        onClose={() => setAsking(false)}
        title={`Retire ${set.title}?`}
        confirmLabel="Retire the limit set"
        pending={change.isPending}
        onConfirm={() => change.mutate()}
      >
        <Text>
          All its versions stay readable, and verdicts and reports made with them stand. It is no longer
          offered for new verdicts until it is brought back.
        </Text>
      </ConfirmDialog>
    </>
  );
}
