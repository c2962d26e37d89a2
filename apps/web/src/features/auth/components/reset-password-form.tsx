import { Button, Input, Stack, Text } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import { resetPasswordSchema } from '@overtally/contracts';
import { useMutation } from '@tanstack/react-query';
import { useForm } from 'react-hook-form';
import { FormField } from '../../../components/form-field.js';
import { FormProblem } from '../../../components/form-problem.js';
import { setFormProblem } from '../../../lib/form-errors.js';
import { resetPassword } from '../api/reset-password.js';

interface ResetPasswordFormProps {
  /** Secret of the link. */
  token: string;
  onDone: () => void;
}

/** Sets a new password by the secret of a link. */
export function ResetPasswordForm({ token, onDone }: ResetPasswordFormProps) {
  const form = useForm({
    resolver: zodResolver(resetPasswordSchema),
    defaultValues: { token, password: '' },
  });
  const { errors } = form.formState;
  const reset = useMutation({
    mutationFn: resetPassword,
    onSuccess: onDone,
    onError: (error) => setFormProblem(form, error),
  });
  return (
    <form noValidate onSubmit={form.handleSubmit((values) => reset.mutate(values))}>
      <Stack gap="4">
        <Text>
          This signs you out everywhere and removes your access keys, in case somebody else has the old
          password.
        </Text>
        <FormProblem message={errors.root?.message ?? errors.token?.message} />
        <FormField label="New password" help="12 characters or more." error={errors.password?.message}>
          <Input type="password" autoComplete="new-password" {...form.register('password')} />
        </FormField>
        <Button type="submit" variant="solid" loading={reset.isPending}>
          Set the password
        </Button>
      </Stack>
    </form>
  );
}
