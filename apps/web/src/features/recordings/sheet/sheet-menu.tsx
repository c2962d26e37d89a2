import { Button, Menu, Portal } from '@chakra-ui/react';
import type { Recording } from '@overtally/contracts';
import { useState } from 'react';
import { ConfirmDialog } from '../../../components/confirm-dialog.js';
import { notifyDone, notifyProblem } from '../../../components/notify.js';
import { formatBytes } from '../../../lib/format.js';
import { apiUrl } from '../../../lib/http.js';
import { useRecordingChanges } from '../hooks/use-recording-changes.js';
import { isBusy } from '../recording-status.js';
import { EditDialog } from './edit/edit-dialog.js';

interface SheetMenuProps {
  recording: Recording;
  /** Channel whose samples are offered. */
  channel: number;
  may: { update: boolean; delete: boolean };
  onReadAgain: () => void;
  onDeleted: () => void;
}

/** Everything else that can be done with a recording. */
export function SheetMenu({ recording, channel, may, onReadAgain, onDeleted }: SheetMenuProps) {
  const [asked, setAsked] = useState<'edit' | 'delete' | null>(null);
  const close = () => setAsked(null);
  const { remove } = useRecordingChanges(recording);
  const name = recording.channels.find(({ index }) => index === channel)?.name ?? '';
  const reading = recording.status === 'received' || recording.status === 'reading';
  return (
    <>
      <Menu.Root positioning={{ placement: 'bottom-end' }}>
        <Menu.Trigger asChild>
          <Button>More</Button>
        </Menu.Trigger>
        <Portal>
          <Menu.Positioner>
            <Menu.Content>
              {may.update ? (
                <>
                  <Menu.Item value="edit" onSelect={() => setAsked('edit')}>
                    Edit bench data
                  </Menu.Item>
                  <Menu.Item value="read" disabled={isBusy(recording)} onSelect={onReadAgain}>
                    Read again with other settings
                  </Menu.Item>
                </>
              ) : null}
              <Menu.Item value="source" asChild>
                <a href={apiUrl(`/recordings/${recording.id}/source`)} download={recording.file.name}>
                  Download the source, {formatBytes(recording.file.size)}
                </a>
              </Menu.Item>
              {name && !reading ? (
                <Menu.Item value="samples" asChild>
                  <a href={apiUrl(`/recordings/${recording.id}/samples`, { channel })} download>
                    Download samples of {name} (.npy)
                  </a>
                </Menu.Item>
              ) : null}
              {may.delete ? (
                <Menu.Item value="delete" color="over" onSelect={() => setAsked('delete')}>
                  Delete
                </Menu.Item>
              ) : null}
            </Menu.Content>
          </Menu.Positioner>
        </Portal>
      </Menu.Root>
      <EditDialog recording={recording} open={asked === 'edit'} onClose={close} />
      <ConfirmDialog
        open={asked === 'delete'}
        onClose={close}
        title={`Delete ${recording.number}?`}
        confirmLabel={`Delete ${recording.number}`}
        destructive
        pending={remove.isPending}
        onConfirm={() =>
          remove.mutate(undefined, {
            onSuccess: () => {
              notifyDone(`${recording.number} deleted`);
              onDeleted();
            },
            onError: (error) => notifyProblem(`${recording.number} was not deleted`, error),
            onSettled: close,
          })
        }
      >
        The source file, its analyses, notes and verdicts go with it. This cannot be undone.
      </ConfirmDialog>
    </>
  );
}
