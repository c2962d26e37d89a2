import { Button, CloseButton, Input, Stack } from '@chakra-ui/react';
import { unitCell } from '@overtally/limits';
import { useFieldArray, useWatch } from 'react-hook-form';
import { FormField, SelectInput } from '../../../components/form-field.js';
import { Section } from '../../../components/section.js';
import type { LimitSetForm } from '../limit-set-form.js';
import { totalWords, type TotalName } from '../limit-set-form-values.js';

const names = Object.keys(totalWords) as TotalName[];
const percentOf: Partial<Record<TotalName, string>> = { THD: '%', TDD: '% IL' };

/** Limits on totals, such as THD; none are needed. */
export function TotalRows({ form, table }: { form: LimitSetForm; table: number }) {
  const name = `tables.${table}.totals` as const;
  const rows = useFieldArray({ control: form.control, name });
  const errors = form.formState.errors.tables?.[table]?.totals;
  const [totals, basis, unit, referenceParameter] = useWatch({
    control: form.control,
    name: [name, 'basis', 'unit', 'referenceParameter'],
  });
  const ownUnit = unitCell({ basis, unit, referenceParameter }) || unit;
  const left = names.filter((each) => !totals.some((total) => total.name === each));
  const add = () => rows.append({ name: left[0] ?? 'THD', limit: '', unit: '', maxOrder: '40' });
  return (
    <Section title="Totals" lead="Limits on sums of orders, where the source gives any.">
      <Stack gap="3" align="flex-start">
        {rows.fields.map((field, index) => (
          <Stack
            key={field.id}
            direction={{ base: 'column', sm: 'row' }}
            gap="3"
            align={{ sm: 'flex-start' }}
            w="full"
            maxW="3xl"
          >
            <FormField label="Total" error={errors?.[index]?.name?.message}>
              <SelectInput
                options={names.map((value) => ({ value, label: totalWords[value] }))}
                {...form.register(`${name}.${index}.name`)}
              />
            </FormField>
            <FormField label="Limit" error={errors?.[index]?.limit?.message}>
              <Input inputMode="decimal" fontFamily="mono" {...form.register(`${name}.${index}.limit`)} />
            </FormField>
            <FormField label="Unit" error={errors?.[index]?.unit?.message}>
              <Input
                autoComplete="off"
                fontFamily="mono"
                placeholder={percentOf[totals[index]?.name ?? 'THC'] ?? ownUnit}
                {...form.register(`${name}.${index}.unit`)}
              />
            </FormField>
            <FormField label="Up to order" error={errors?.[index]?.maxOrder?.message}>
              <Input inputMode="numeric" fontFamily="mono" {...form.register(`${name}.${index}.maxOrder`)} />
            </FormField>
            <CloseButton
              size="sm"
              variant="ghost"
              mt={{ sm: '6' }}
              alignSelf="flex-start"
              aria-label={`Remove total ${index + 1}`}
              onClick={() => rows.remove(index)}
            />
          </Stack>
        ))}
        <Button size="xs" disabled={left.length === 0} onClick={add}>
          Add a total
        </Button>
      </Stack>
    </Section>
  );
}
