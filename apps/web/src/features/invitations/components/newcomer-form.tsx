import { Button, Input, Stack } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import { acceptInvitationSchema, type AcceptedInvitation } from '@overtally/contracts';
import { useMutation } from '@tanstack/react-query';
import { useForm } from 'react-hook-form';
import { FormField } from '../../../components/form-field.js';
import { FormProblem } from '../../../components/form-problem.js';
import { setFormProblem } from '../../../lib/form-errors.js';
import { acceptInvitation } from '../api/accept-invitation.js';

interface NewcomerFormProps {
  token: string;
  email: string;
  onAccepted: (accepted: AcceptedInvitation) => void;
}

const newcomerSchema = acceptInvitationSchema.required({ name: true, password: true });

/** Makes the account of the address and accepts. */
export function NewcomerForm({ token, email, onAccepted }: NewcomerFormProps) {
  const form = useForm({
    resolver: zodResolver(newcomerSchema),
    defaultValues: { token, name: '', password: '' },
  });
  const { errors } = form.formState;
  const accept = useMutation({
    mutationFn: acceptInvitation,
    onSuccess: onAccepted,
    onError: (error) => setFormProblem(form, error),
  });
  return (
    <form noValidate onSubmit={form.handleSubmit((values) => accept.mutate(values))}>
      <Stack gap="4">
        <FormProblem message={errors.root?.message ?? errors.token?.message} />
        <FormField label="E-mail" help="You sign in with it.">
          <Input type="email" autoComplete="username" value={email} readOnly />
        </FormField>
        <FormField label="Your name" help="Reports and notes show it." error={errors.name?.message}>
          <Input autoComplete="name" {...form.register('name')} />
        </FormField>
        <FormField label="Password" help="12 characters or more." error={errors.password?.message}>
          <Input type="password" autoComplete="new-password" {...form.register('password')} />
        </FormField>
        <Button type="submit" variant="solid" loading={accept.isPending}>
          Accept
        </Button>
      </Stack>
    </form>
  );
}
