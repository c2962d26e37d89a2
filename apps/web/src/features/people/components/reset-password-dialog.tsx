import { Button, Input, Stack, Text } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import { createUserSchema, type User } from '@overtally/contracts';
import { useForm } from 'react-hook-form';
import { FormField } from '../../../components/form-field.js';
import { FormProblem } from '../../../components/form-problem.js';
import { Modal } from '../../../components/modal.js';
import { notifyDone } from '../../../components/notify.js';
import { setFormProblem } from '../../../lib/form-errors.js';
import { useUserChanges } from '../hooks/use-user-changes.js';

interface ResetPasswordDialogProps {
  user: User;
  open: boolean;
  onClose: () => void;
}

/** Gives somebody a new password, which ends their sessions. */
export function ResetPasswordDialog({ user, open, onClose }: ResetPasswordDialogProps) {
  return (
    <Modal open={open} onClose={onClose} title={`New password for ${user.name}`}>
      <ResetPasswordForm user={user} onClose={onClose} />
    </Modal>
  );
}

const passwordSchema = createUserSchema.pick({ password: true });

function ResetPasswordForm({ user, onClose }: Omit<ResetPasswordDialogProps, 'open'>) {
  const form = useForm({ resolver: zodResolver(passwordSchema), defaultValues: { password: '' } });
  const { errors } = form.formState;
  const { update } = useUserChanges();
  const submit = form.handleSubmit((change) =>
    update.mutate(
      { user, change },
      {
        onSuccess: () => {
          notifyDone(`${user.name} has a new password`);
          onClose();
        },
        onError: (error) => setFormProblem(form, error),
      },
    ),
  );
  return (
    <form noValidate onSubmit={submit}>
      <Stack gap="4">
        <Text>{user.name} is signed out everywhere and signs in with the new password.</Text>
        <FormProblem message={errors.root?.message} />
        <FormField label="New password" help="12 characters or more." error={errors.password?.message}>
          <Input autoComplete="off" spellCheck={false} fontFamily="mono" {...form.register('password')} />
        </FormField>
        <Stack direction="row" justify="flex-end" gap="2">
          <Button onClick={onClose}>Cancel</Button>
          <Button type="submit" variant="solid" loading={update.isPending}>
            Set password
          </Button>
        </Stack>
      </Stack>
    </form>
  );
}
