import { Button, Input, SimpleGrid, Stack, Textarea } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import { quantitySchema, type LimitSet } from '@overtally/contracts';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useForm, useWatch } from 'react-hook-form';
import { FormField, SelectInput } from '../../../components/form-field.js';
import { FormProblem } from '../../../components/form-problem.js';
import { Section } from '../../../components/section.js';
import { setFormProblem } from '../../../lib/form-errors.js';
import { createLimitSet } from '../api/create-limit-set.js';
import { emptyLimitSet, limitSetFormSchema, usualUnit } from '../limit-set-form-values.js';
import { basisWords, quantityWords } from '../limit-words.js';
import { OrderRows } from './order-rows.js';
import { TotalRows } from './total-rows.js';

interface CreateLimitSetFormProps {
  projectId: string;
  onCreated: (set: LimitSet) => void;
  onCancel: () => void;
}

const quantityOptions = quantitySchema.options.map((value) => ({ value, label: quantityWords[value] }));
const basisOptions = (['absolute', 'percent-of-fundamental'] as const).map((value) => ({
  value,
  label: `${basisWords[value].charAt(0).toUpperCase()}${basisWords[value].slice(1)}`,
}));

/** A limit set of the project's own: where it comes from, its limits by order, its totals. */
export function CreateLimitSetForm({ projectId, onCreated, onCancel }: CreateLimitSetFormProps) {
  const queryClient = useQueryClient();
  const form = useForm({ resolver: zodResolver(limitSetFormSchema), defaultValues: emptyLimitSet });
  const { errors } = form.formState;
  const basis = useWatch({ control: form.control, name: 'basis' });
  const unit = useWatch({ control: form.control, name: 'unit' });
  const create = useMutation({
    mutationFn: (input: Parameters<typeof createLimitSet>[1]) => createLimitSet(projectId, input),
    onSuccess: async (set) => {
      await queryClient.invalidateQueries({ queryKey: ['limit-sets'] });
      onCreated(set);
    },
    onError: (error) => setFormProblem(form, error),
  });
  return (
    <form noValidate onSubmit={form.handleSubmit((values) => create.mutate(values))}>
      <Section title="The set">
        <SimpleGrid columns={{ base: 1, md: 2 }} gap="4" maxW="4xl">
          <FormField label="Title" error={errors.title?.message}>
            <Input autoComplete="off" {...form.register('title')} />
          </FormField>
          <FormField
            label="Source"
            error={errors.source?.message}
            help="Contract, customer specification or document with its table."
          >
            <Input autoComplete="off" {...form.register('source')} />
          </FormField>
          <FormField label="Standard" optional error={errors.standard?.message}>
            <Input autoComplete="off" {...form.register('standard')} />
          </FormField>
          <FormField label="Edition" optional error={errors.edition?.message}>
            <Input autoComplete="off" {...form.register('edition')} />
          </FormField>
          <FormField label="Quantity" error={errors.quantity?.message}>
            <SelectInput
              options={quantityOptions}
              {...form.register('quantity', {
                onChange: (event: { target: { value: string } }) =>
                  form.setValue('unit', usualUnit[quantitySchema.parse(event.target.value)]),
              })}
            />
          </FormField>
          <Stack direction="row" gap="4">
            <FormField label="Limits are" error={errors.basis?.message}>
              <SelectInput options={basisOptions} {...form.register('basis')} />
            </FormField>
            {basis === 'absolute' ? (
              <FormField label="Unit" error={errors.unit?.message}>
                <Input autoComplete="off" maxW="24" {...form.register('unit')} />
              </FormField>
            ) : null}
          </Stack>
          <FormField label="Applies when" optional error={errors.appliesWhen?.message}>
            <Textarea rows={2} {...form.register('appliesWhen')} />
          </FormField>
        </SimpleGrid>
      </Section>
      <OrderRows form={form} unit={basis === 'absolute' ? unit : '%'} />
      <TotalRows form={form} unit={basis === 'absolute' ? unit : '%'} />
      <Stack gap="3" align="flex-start">
        <FormProblem message={errors.root?.message} />
        <Stack direction="row" gap="2">
          <Button type="submit" variant="solid" loading={create.isPending}>
            Create limit set
          </Button>
          <Button onClick={onCancel}>Cancel</Button>
        </Stack>
      </Stack>
    </form>
  );
}
