import { Button, Flex, Input, Stack } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import { addMemberSchema, type CreateInvitation } from '@overtally/contracts';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { FormField, SelectInput } from '../../../components/form-field.js';
import { FormProblem } from '../../../components/form-problem.js';
import { notifyDone } from '../../../components/notify.js';
import { ApiProblem } from '../../../lib/api-problem.js';
import { setFormProblem } from '../../../lib/form-errors.js';
import { useMemberChanges } from '../hooks/use-member-changes.js';
import { roleOptions } from '../role-words.js';
import { InviteDialog } from './invite-dialog.js';

const empty = { email: '', role: 'technician' as const };

/** Adds somebody who has an account, by e-mail; whoever has none is invited. */
export function AddMemberForm({ projectId }: { projectId: string }) {
  const form = useForm({ resolver: zodResolver(addMemberSchema), defaultValues: empty });
  const { errors } = form.formState;
  const { add } = useMemberChanges(projectId);
  const [wanted, setWanted] = useState<CreateInvitation | null>(null);
  const submit = form.handleSubmit((values) =>
    add.mutate(values, {
      onSuccess: (member) => {
        form.reset(empty);
        notifyDone(`${member.name} added`);
      },
      onError: (error) => {
        if (error instanceof ApiProblem && error.code === 'unknown-person') setWanted(values);
        else setFormProblem(form, error);
      },
    }),
  );
  return (
    <form noValidate onSubmit={submit}>
      <Stack gap="3" mb="5">
        <FormProblem message={errors.root?.message} />
        <Flex gap="3" wrap="wrap" align="flex-start">
          <Flex flex="1 1 240px" maxW="sm">
            <FormField
              label="E-mail"
              error={
                errors.email &&
                (errors.email.type === 'server' ? errors.email.message : 'Give an e-mail address')
              }
            >
              <Input type="email" autoComplete="off" {...form.register('email')} />
            </FormField>
          </Flex>
          <Flex flex="0 1 160px">
            <FormField label="Role" error={errors.role?.message}>
              <SelectInput options={roleOptions} {...form.register('role')} />
            </FormField>
          </Flex>
          <Button type="submit" variant="solid" loading={add.isPending} mt="26px">
            Add member
          </Button>
        </Flex>
      </Stack>
      <InviteDialog
        projectId={projectId}
        wanted={wanted}
        onClose={() => setWanted(null)}
        onInvited={() => form.reset(empty)}
      />
    </form>
  );
}
