import { Button, Input, Stack, Textarea } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import { createProjectSchema, type Project } from '@overtally/contracts';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useId } from 'react';
import { useForm } from 'react-hook-form';
import { FormField } from '../../../components/form-field.js';
import { FormProblem } from '../../../components/form-problem.js';
import { Modal } from '../../../components/modal.js';
import { setFormProblem } from '../../../lib/form-errors.js';
import { createProject } from '../api/create-project.js';
import { projectListsKey } from '../api/list-projects.js';

interface CreateProjectDialogProps {
  open: boolean;
  onClose: () => void;
  onCreated: (project: Project) => void;
}

/** Begins a project; whoever begins it is its manager. */
export function CreateProjectDialog({ open, onClose, onCreated }: CreateProjectDialogProps) {
  return (
    <Modal open={open} onClose={onClose} title="New project">
      <CreateProjectForm onClose={onClose} onCreated={onCreated} />
    </Modal>
  );
}

function CreateProjectForm({ onClose, onCreated }: Omit<CreateProjectDialogProps, 'open'>) {
  const id = useId();
  const queryClient = useQueryClient();
  const form = useForm({
    resolver: zodResolver(createProjectSchema),
    defaultValues: { name: '', customer: '', description: '' },
  });
  const { errors } = form.formState;
  const create = useMutation({
    mutationFn: createProject,
    onSuccess: async (project) => {
      await queryClient.invalidateQueries({ queryKey: projectListsKey });
      onCreated(project);
    },
    onError: (error) => setFormProblem(form, error),
  });
  return (
    <form id={id} noValidate onSubmit={form.handleSubmit((values) => create.mutate(values))}>
      <Stack gap="4">
        <FormProblem message={errors.root?.message} />
        <FormField label="Name" error={errors.name && 'Name the project, in 160 characters or fewer'}>
          <Input autoComplete="off" {...form.register('name')} />
        </FormField>
        <FormField
          label="Customer"
          optional
          error={errors.customer?.message}
          help="For whom the work is done."
        >
          <Input autoComplete="off" {...form.register('customer')} />
        </FormField>
        <FormField label="Description" optional error={errors.description?.message}>
          <Textarea rows={3} {...form.register('description')} />
        </FormField>
        <Stack direction="row" justify="flex-end" gap="2">
          <Button onClick={onClose}>Cancel</Button>
          <Button type="submit" variant="solid" loading={create.isPending}>
            Create project
          </Button>
        </Stack>
      </Stack>
    </form>
  );
}
