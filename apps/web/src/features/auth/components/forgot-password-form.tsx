import { Button, Input, Stack, Text } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import { forgotPasswordSchema } from '@overtally/contracts';
import { useMutation } from '@tanstack/react-query';
import { useForm } from 'react-hook-form';
import { FormField } from '../../../components/form-field.js';
import { FormProblem } from '../../../components/form-problem.js';
import { setFormProblem } from '../../../lib/form-errors.js';
import { forgotPassword } from '../api/forgot-password.js';

/** Asks for a link by which a new password can be set. */
export function ForgotPasswordForm() {
  const form = useForm({ resolver: zodResolver(forgotPasswordSchema), defaultValues: { email: '' } });
  const { errors } = form.formState;
  const ask = useMutation({
    mutationFn: forgotPassword,
    onError: (error) => setFormProblem(form, error),
  });
  if (ask.isSuccess) {
    return (
      <Text role="status">
        If {ask.variables.email} has an account, a message with a link is on its way. The link works once and
        for {ask.data.validForMinutes} minutes.
      </Text>
    );
  }
  return (
    <form noValidate onSubmit={form.handleSubmit((values) => ask.mutate(values))}>
      <Stack gap="4">
        <FormProblem message={errors.root?.message} />
        <FormField label="E-mail" error={errors.email ? 'Give your e-mail address' : undefined}>
          <Input type="email" autoComplete="username" {...form.register('email')} />
        </FormField>
        <Button type="submit" variant="solid" loading={ask.isPending}>
          Send a link
        </Button>
      </Stack>
    </form>
  );
}
