import { Button } from '@chakra-ui/react';
import type { AccessKey } from '@overtally/contracts';
import { useState } from 'react';
import { ConfirmDialog } from '../../../components/confirm-dialog.js';
import { notifyDone, notifyProblem } from '../../../components/notify.js';
import { useAccessKeyChanges } from '../hooks/use-access-key-changes.js';

/** Removes a key for good, once it is said what that stops. */
export function RemoveAccessKey({ accessKey }: { accessKey: AccessKey }) {
  const [asking, setAsking] = useState(false);
  const { remove } = useAccessKeyChanges();
  // A promise, since the row and its callbacks are gone once the list is renewed.
  const removeNow = () =>
    void remove
      .mutateAsync(accessKey.id)
      .then(
        () => notifyDone(`${accessKey.name} removed`),
        (error: unknown) => notifyProblem(`${accessKey.name} not removed`, error),
      )
      .finally(() => setAsking(false));
  return (
    <>
      <Button variant="ghost" aria-label={`Remove ${accessKey.name}`} onClick={() => setAsking(true)}>
        Remove
      </Button>
      <ConfirmDialog
        open={asking}
        onClose={() => setAsking(false)}
        title={`Remove ${accessKey.name}?`}
        confirmLabel={`Remove ${accessKey.name}`}
        destructive
        pending={remove.isPending}
        onConfirm={removeNow}
      >
        Scripts that use this key are refused at once. It cannot be brought back.
      </ConfirmDialog>
    </>
  );
}
