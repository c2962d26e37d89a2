import { Button, Input, Stack } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import { changePasswordSchema } from '@overtally/contracts';
import { useMutation } from '@tanstack/react-query';
import { useForm } from 'react-hook-form';
import { FormField } from '../../../components/form-field.js';
import { FormProblem } from '../../../components/form-problem.js';
import { notifyDone } from '../../../components/notify.js';
import { setFormProblem } from '../../../lib/form-errors.js';
import { changePassword } from '../api/change-password.js';

const empty = { currentPassword: '', newPassword: '' };

/** Change of one's own password. */
export function PasswordForm() {
  const form = useForm({ resolver: zodResolver(changePasswordSchema), defaultValues: empty });
  const { errors } = form.formState;
  const change = useMutation({
    mutationFn: changePassword,
    onSuccess: () => {
      form.reset(empty);
      notifyDone('Password changed');
    },
    onError: (error) => setFormProblem(form, error),
  });
  return (
    <form noValidate onSubmit={form.handleSubmit((values) => change.mutate(values))}>
      <Stack gap="4" maxW="md" align="flex-start">
        <FormProblem message={errors.root?.message} />
        <FormField label="Current password" error={errors.currentPassword?.message}>
          <Input type="password" autoComplete="current-password" {...form.register('currentPassword')} />
        </FormField>
        <FormField label="New password" help="12 characters or more." error={errors.newPassword?.message}>
          <Input type="password" autoComplete="new-password" {...form.register('newPassword')} />
        </FormField>
        <Button type="submit" variant="solid" loading={change.isPending}>
          Change password
        </Button>
      </Stack>
    </form>
  );
}
