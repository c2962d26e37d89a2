import { Button, Input, Menu, Portal } from '@chakra-ui/react';
import type { Study } from '@overtally/contracts';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { ConfirmDialog } from '../../../components/confirm-dialog.js';
import { FormField } from '../../../components/form-field.js';
import { Modal } from '../../../components/modal.js';
import { notifyDone, notifyProblem } from '../../../components/notify.js';
import { deleteStudy, updateStudy } from '../api/write-study.js';

interface StudyMenuProps {
  study: Study;
  onDeleted: () => void;
}

/** Renames, retires or deletes a study. */
export function StudyMenu({ study, onDeleted }: StudyMenuProps) {
  const queryClient = useQueryClient();
  const [dialog, setDialog] = useState<'name' | 'delete' | null>(null);
  const [name, setName] = useState(study.name);
  const refresh = async () => {
    await queryClient.invalidateQueries({ queryKey: ['studies', study.id] });
    await queryClient.invalidateQueries({ queryKey: ['projects', study.projectId, 'studies'] });
  };
  const change = useMutation({
    mutationFn: (input: Parameters<typeof updateStudy>[1]) => updateStudy(study.id, input),
    onSuccess: async (saved) => {
      setDialog(null);
      await refresh();
      notifyDone(`${saved.number} changed`);
    },
    onError: (error) => notifyProblem('Not changed', error),
  });
  const remove = useMutation({
    mutationFn: () => deleteStudy(study.id),
    onSuccess: async () => {
      await queryClient.invalidateQueries({ queryKey: ['projects', study.projectId, 'studies'] });
      notifyDone(`${study.number} deleted`);
      onDeleted();
    },
    onError: (error) => notifyProblem('Not deleted', error),
  });
  const isRetired = study.retiredAt !== null;
  return (
    <>
      <Menu.Root positioning={{ placement: 'bottom-end' }}>
        <Menu.Trigger asChild>
          <Button aria-label={`More for ${study.number}`}>More</Button>
        </Menu.Trigger>
        <Portal>
          <Menu.Positioner>
            <Menu.Content>
              <Menu.Item value="name" onClick={() => setDialog('name')}>
                Rename
              </Menu.Item>
              <Menu.Item value="retire" onClick={() => change.mutate({ retired: !isRetired })}>
                {isRetired ? 'Bring back' : 'Retire'}
              </Menu.Item>
              <Menu.Item value="delete" color="over" onClick={() => setDialog('delete')}>
                Delete
              </Menu.Item>
            </Menu.Content>
          </Menu.Positioner>
        </Portal>
      </Menu.Root>
      <Modal
        open={dialog === 'name'}
        onClose={() => setDialog(null)}
        title="Rename the study"
        footer={
          <Button
            variant="solid"
            loading={change.isPending}
            disabled={name.trim() === ''}
            onClick={() => change.mutate({ name: name.trim() })}
          >
            Rename
          </Button>
        }
      >
        <FormField label="Name">
          <Input value={name} maxLength={160} onChange={(event) => setName(event.target.value)} />
        </FormField>
      </Modal>
      <ConfirmDialog
        open={dialog === 'delete'}
        onClose={() => setDialog(null)}
        title={`Delete ${study.number}?`}
        confirmLabel={`Delete ${study.number}`}
        destructive
        pending={remove.isPending}
        onConfirm={() => remove.mutate()}
      >
        All its versions go with it, and it cannot be brought back. A study that a report speaks of can be
        retired instead.
      </ConfirmDialog>
    </>
  );
}
