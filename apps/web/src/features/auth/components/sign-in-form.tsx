import { Button, Input, Stack } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import { signInSchema, type OwnAccount } from '@overtally/contracts';
import { useMutation } from '@tanstack/react-query';
import { useForm } from 'react-hook-form';
import { FormField } from '../../../components/form-field.js';
import { FormProblem } from '../../../components/form-problem.js';
import { ApiProblem, problemText } from '../../../lib/api-problem.js';
import { signIn } from '../api/sign-in.js';

/** Why a sign-in was refused, with the time to wait when there were too many. */
function refusal(error: unknown): string {
  if (!(error instanceof ApiProblem)) return problemText(error);
  if (error.status === 401) return 'E-mail or password is not right.';
  if (error.status !== 429) return problemText(error);
  const wait = error.retryAfterS
    ? `in ${Math.max(1, Math.ceil(error.retryAfterS / 60))} min`
    : 'in a few minutes';
  return `Too many attempts. Try again ${wait}.`;
}

/** E-mail and password. */
export function SignInForm({ onSignedIn }: { onSignedIn: (account: OwnAccount) => void }) {
  const form = useForm({ resolver: zodResolver(signInSchema), defaultValues: { email: '', password: '' } });
  const { errors } = form.formState;
  const submit = useMutation({
    mutationFn: signIn,
    onSuccess: onSignedIn,
    onError: (error) => {
      form.setError('root', { message: refusal(error) });
      form.resetField('password');
      form.setFocus('password');
    },
  });
  return (
    <form noValidate onSubmit={form.handleSubmit((values) => submit.mutate(values))}>
      <Stack gap="4">
        <FormProblem message={errors.root?.message} />
        <FormField label="E-mail" error={errors.email ? 'Give your e-mail address' : undefined}>
          <Input type="email" autoComplete="username" {...form.register('email')} />
        </FormField>
        <FormField label="Password" error={errors.password ? 'Give your password' : undefined}>
          <Input type="password" autoComplete="current-password" {...form.register('password')} />
        </FormField>
        <Button type="submit" variant="solid" loading={submit.isPending}>
          Sign in
        </Button>
      </Stack>
    </form>
  );
}
