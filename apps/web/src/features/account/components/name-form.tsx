import { Button, Input, Stack } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import { updateAccountSchema, type Account } from '@overtally/contracts';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useForm } from 'react-hook-form';
import { FormField } from '../../../components/form-field.js';
import { FormProblem } from '../../../components/form-problem.js';
import { notifyDone } from '../../../components/notify.js';
import { setFormProblem } from '../../../lib/form-errors.js';
import { accountQuery } from '../api/get-account.js';
import { updateAccount } from '../api/update-account.js';

/** Own name, as it stands beside what one does. */
export function NameForm({ account }: { account: Account }) {
  const queryClient = useQueryClient();
  const form = useForm({ resolver: zodResolver(updateAccountSchema), defaultValues: { name: account.name } });
  const { errors, isDirty } = form.formState;
  const save = useMutation({
    mutationFn: updateAccount,
    onSuccess: (saved) => {
      queryClient.setQueryData(accountQuery().queryKey, saved);
      form.reset({ name: saved.name });
      notifyDone('Name saved');
    },
    onError: (error) => setFormProblem(form, error),
  });
  return (
    <form noValidate onSubmit={form.handleSubmit((values) => save.mutate(values))}>
      <Stack gap="4" maxW="md" align="flex-start">
        <FormProblem message={errors.root?.message} />
        <FormField
          label="Name"
          error={errors.name?.message}
          help="Stands beside your notes, verdicts and reports."
        >
          <Input autoComplete="name" {...form.register('name')} />
        </FormField>
        <FormField label="E-mail" help="An administrator can give you another account.">
          <Input value={account.email} readOnly color="inkSoft" />
        </FormField>
        <Button type="submit" variant="solid" loading={save.isPending} disabled={!isDirty}>
          Save name
        </Button>
      </Stack>
    </form>
  );
}
