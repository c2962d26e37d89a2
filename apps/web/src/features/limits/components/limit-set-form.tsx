import { Box, Button, Input, SimpleGrid, Stack, Textarea } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import {
  limitBasisSchema,
  parameterNameSchema,
  quantitySchema,
  type CreateLimitSet,
  type LimitSet,
} from '@overtally/contracts';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import { FormField, SelectInput } from '../../../components/form-field.js';
import { FormProblem } from '../../../components/form-problem.js';
import { Section } from '../../../components/section.js';
import { parameterWords } from '../../../components/verdict/verdict-words.js';
import { setFormProblem } from '../../../lib/form-errors.js';
import type { LimitSetForm as Form } from '../limit-set-form.js';
import {
  emptyLimitSet,
  formValuesOf,
  limitSetFormSchema,
  limitSetFrom,
  usualUnit,
} from '../limit-set-form-values.js';
import { basisWords, quantityWords, rowChoiceWords } from '../limit-words.js';
import { OrderRows } from './order-rows.js';
import { TotalRows } from './total-rows.js';

interface LimitSetFormProps {
  /** The set that a new version is made of; its procedure and conditions are kept. */
  base?: LimitSet;
  submitLabel: string;
  onSubmit: (input: CreateLimitSet) => Promise<LimitSet>;
  onDone: (set: LimitSet) => void;
  onCancel: () => void;
}

/** A unit keeps its letters: mA is no MA. */
const sentence = (text: string): string =>
  text.startsWith('mA') ? text : `${text.charAt(0).toUpperCase()}${text.slice(1)}`;
const quantityOptions = quantitySchema.options.map((value) => ({ value, label: quantityWords[value] }));
const basisOptions = limitBasisSchema.options.map((value) => ({
  value,
  label: sentence(basisWords[value]),
}));
const referenceOptions = (['ilA', 'irefA', 'nominalV'] as const).map((value) => ({
  value,
  label: parameterWords[value].label,
}));

/** A limit set of the project's own: where it comes from, its limits by order, its totals. */
export function LimitSetForm({ base, submitLabel, onSubmit, onDone, onCancel }: LimitSetFormProps) {
  const queryClient = useQueryClient();
  const form = useForm({
    resolver: zodResolver(limitSetFormSchema),
    defaultValues: base ? formValuesOf(base) : emptyLimitSet,
  });
  const save = useMutation({
    mutationFn: onSubmit,
    onSuccess: async (set) => {
      await queryClient.invalidateQueries({ queryKey: ['limit-sets'] });
      onDone(set);
    },
    onError: (error) => setFormProblem(form, error),
  });
  return (
    <form noValidate onSubmit={form.handleSubmit((values) => save.mutate(limitSetFrom(values, base)))}>
      <TheSet form={form} />
      <Tables form={form} base={base} />
      <Stack gap="3" align="flex-start">
        <FormProblem message={form.formState.errors.root?.message} />
        <Stack direction="row" gap="2">
          <Button type="submit" variant="solid" loading={save.isPending}>
            {submitLabel}
          </Button>
          <Button onClick={onCancel}>Cancel</Button>
        </Stack>
      </Stack>
    </form>
  );
}

function TheSet({ form }: { form: Form }) {
  const { errors } = form.formState;
  const basis = useWatch({ control: form.control, name: 'basis' });
  return (
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
        <Stack direction={{ base: 'column', sm: 'row' }} gap="4">
          <FormField label="Limits are" error={errors.basis?.message}>
            <SelectInput options={basisOptions} {...form.register('basis')} />
          </FormField>
          {basis === 'absolute' ? (
            <FormField label="Unit" error={errors.unit?.message}>
              <Input autoComplete="off" maxW="24" {...form.register('unit')} />
            </FormField>
          ) : null}
          {basis === 'percent-of-reference' ? (
            <FormField label="Reference" error={errors.referenceParameter?.message}>
              <SelectInput
                options={referenceOptions}
                {...form.register('referenceParameter', {
                  setValueAs: (value: string) => parameterNameSchema.parse(value),
                })}
              />
            </FormField>
          ) : null}
        </Stack>
        <FormField label="Applies when" optional error={errors.appliesWhen?.message}>
          <Textarea rows={2} {...form.register('appliesWhen')} />
        </FormField>
      </SimpleGrid>
    </Section>
  );
}

/** The limits; of a set with several tables one at a time. */
function Tables({ form, base }: { form: Form; base: LimitSet | undefined }) {
  const [table, setTable] = useState(0);
  const tables = form.getValues('tables');
  const wrong = form.formState.errors.tables;
  return (
    <>
      {tables.length > 1 ? (
        <Box maxW="lg" mb="6">
          <FormField label={rowChoiceWords[base?.rowChoice ?? 'range']}>
            <SelectInput
              options={tables.map(({ label }, index) => ({
                value: String(index),
                label: wrong?.[index] ? `${label} (to be mended)` : label,
              }))}
              value={String(table)}
              onChange={(event) => setTable(Number(event.target.value))}
            />
          </FormField>
        </Box>
      ) : null}
      <OrderRows key={`orders-${table}`} form={form} table={table} />
      <TotalRows key={`totals-${table}`} form={form} table={table} />
    </>
  );
}
