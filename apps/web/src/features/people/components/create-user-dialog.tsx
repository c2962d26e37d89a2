import { Button, Checkbox, Input, Stack } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import { createUserSchema } from '@overtally/contracts';
import { useForm } from 'react-hook-form';
import { FormField } from '../../../components/form-field.js';
import { FormProblem } from '../../../components/form-problem.js';
import { Modal } from '../../../components/modal.js';
import { notifyDone } from '../../../components/notify.js';
import { setFormProblem } from '../../../lib/form-errors.js';
import { useUserChanges } from '../hooks/use-user-changes.js';

interface CreateUserDialogProps {
  open: boolean;
  onClose: () => void;
}

/** Makes an account with a first password, to be handed over in person. */
export function CreateUserDialog({ open, onClose }: CreateUserDialogProps) {
  return (
    <Modal open={open} onClose={onClose} title="New account">
      <CreateUserForm onClose={onClose} />
    </Modal>
  );
}

function CreateUserForm({ onClose }: { onClose: () => void }) {
  const form = useForm({
    resolver: zodResolver(createUserSchema),
    defaultValues: { name: '', email: '', password: '', isAdministrator: false },
  });
  const { errors } = form.formState;
  const { create } = useUserChanges();
  const submit = form.handleSubmit((values) =>
    create.mutate(values, {
      onSuccess: (user) => {
        notifyDone(`Account for ${user.name} made`);
        onClose();
      },
      onError: (error) => setFormProblem(form, error),
    }),
  );
  return (
    <form noValidate onSubmit={submit}>
      <Stack gap="4">
        <FormProblem message={errors.root?.message} />
        <FormField label="Name" error={errors.name && 'Give the name, in 120 characters or fewer'}>
          <Input autoComplete="off" {...form.register('name')} />
        </FormField>
        <FormField label="E-mail" error={errors.email?.message}>
          <Input type="email" autoComplete="off" {...form.register('email')} />
        </FormField>
        <FormField
          label="First password"
          help="12 characters or more. Hand it over in person; it can be changed on the account page."
          error={errors.password?.message}
        >
          <Input autoComplete="off" spellCheck={false} fontFamily="mono" {...form.register('password')} />
        </FormField>
        <Checkbox.Root size="sm">
          <Checkbox.HiddenInput {...form.register('isAdministrator')} />
          <Checkbox.Control borderColor="edge" />
          <Checkbox.Label fontWeight="400">
            Administrator: manages accounts and may read every project
          </Checkbox.Label>
        </Checkbox.Root>
        <Stack direction="row" justify="flex-end" gap="2">
          <Button onClick={onClose}>Cancel</Button>
          <Button type="submit" variant="solid" loading={create.isPending}>
            Make account
          </Button>
        </Stack>
      </Stack>
    </form>
  );
}
