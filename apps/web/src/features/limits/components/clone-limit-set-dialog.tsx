import { Button, Input, Stack, Text } from '@chakra-ui/react';
import type { LimitSet } from '@overtally/contracts';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState, type FormEvent } from 'react';
import { ErrorState } from '../../../components/error-state.js';
import { FormField } from '../../../components/form-field.js';
import { Modal } from '../../../components/modal.js';
import { cloneLimitSet } from '../api/clone-limit-set.js';

interface CloneLimitSetDialogProps {
  projectId: string;
  set: LimitSet;
  onClose: () => void;
  onCloned: (set: LimitSet) => void;
}

/** Copies a set into one of the project's own, under a name of its own. */
export function CloneLimitSetDialog({ projectId, set, onClose, onCloned }: CloneLimitSetDialogProps) {
  const queryClient = useQueryClient();
  const [title, setTitle] = useState(`Copy of ${set.title}`.slice(0, 160));
  const clone = useMutation({
    mutationFn: () => cloneLimitSet(projectId, { limitSetId: set.id, title }),
    onSuccess: async (made) => {
      await queryClient.invalidateQueries({ queryKey: ['limit-sets'] });
      onCloned(made);
    },
  });
  const submit = (event: FormEvent) => {
    event.preventDefault();
    clone.mutate();
  };
  return (
    <Modal
      open
      onClose={onClose}
      title={`Copy ${set.title}`}
      footer={
        <>
          <Button onClick={onClose}>Cancel</Button>
          <Button
            type="submit"
            form="clone-limit-set"
            variant="solid"
            disabled={title.trim() === ''}
            loading={clone.isPending}
          >
            Make the copy
          </Button>
        </>
      }
    >
      <form id="clone-limit-set" onSubmit={submit}>
        <Stack gap="3">
          {clone.isError ? <ErrorState error={clone.error} title="Not copied" /> : null}
          <Text color="inkSoft">
            The copy belongs to this project and judges as the original does. Change its limits by a new
            version.
          </Text>
          <FormField label="Title of the copy" error={title.trim() === '' ? 'Name the limit set' : undefined}>
            <Input autoComplete="off" value={title} onChange={(event) => setTitle(event.target.value)} />
          </FormField>
        </Stack>
      </form>
    </Modal>
  );
}
