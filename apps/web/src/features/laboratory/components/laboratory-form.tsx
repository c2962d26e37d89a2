import { Button, Flex, Input, Stack, Textarea } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import { updateLaboratorySchema, type Laboratory } from '@overtally/contracts';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useForm } from 'react-hook-form';
import { FormField } from '../../../components/form-field.js';
import { FormProblem } from '../../../components/form-problem.js';
import { notifyDone } from '../../../components/notify.js';
import { setFormProblem } from '../../../lib/form-errors.js';
import { laboratoryQuery, putLaboratory } from '../api/laboratory.js';

/** What the title page of a report says of the laboratory. */
export function LaboratoryForm({ laboratory }: { laboratory: Laboratory }) {
  const queryClient = useQueryClient();
  const form = useForm({ resolver: zodResolver(updateLaboratorySchema), defaultValues: laboratory });
  const { errors } = form.formState;
  const save = useMutation({
    mutationFn: putLaboratory,
    onSuccess: (saved) => {
      queryClient.setQueryData(laboratoryQuery().queryKey, saved);
      form.reset(saved);
      notifyDone('Laboratory saved');
    },
    onError: (error) => setFormProblem(form, error),
  });
  return (
    <form noValidate onSubmit={form.handleSubmit((values) => save.mutate(values))}>
      <Stack gap="4" maxW="3xl">
        <FormProblem message={errors.root?.message} />
        <FormField label="Name" error={errors.name?.message}>
          <Input autoComplete="off" {...form.register('name')} />
        </FormField>
        <FormField label="Address" optional error={errors.address?.message}>
          <Textarea rows={3} {...form.register('address')} />
        </FormField>
        <FormField label="Contact" optional error={errors.contact?.message}>
          <Input autoComplete="off" {...form.register('contact')} />
        </FormField>
        <FormField
          label="Accreditation"
          optional
          help="As the accreditation body lets it be stated. Left empty, reports say that there is none."
          error={errors.accreditation?.message}
        >
          <Textarea rows={2} {...form.register('accreditation')} />
        </FormField>
        <Flex>
          <Button type="submit" variant="solid" loading={save.isPending}>
            Save
          </Button>
        </Flex>
      </Stack>
    </form>
  );
}
