import { Button } from '@chakra-ui/react';
import type { Recording } from '@overtally/contracts';
import { notifyProblem } from '../../components/notify.js';
import { useRecordingChanges } from './hooks/use-recording-changes.js';

/** Calls off the reading of a recording that waits for it or is being read. Its source stays. */
export function CancelReading({ recording }: { recording: Recording }) {
  const { stopReading } = useRecordingChanges(recording);
  return (
    <Button
      size="xs"
      aria-label={`Cancel reading ${recording.number}`}
      loading={stopReading.isPending}
      onClick={() =>
        stopReading.mutate(undefined, {
          onError: (error) => notifyProblem(`Reading ${recording.number} was not cancelled`, error),
        })
      }
    >
      Cancel
    </Button>
  );
}
