import { Button, CloseButton, Input, Stack } from '@chakra-ui/react';
import { useFieldArray } from 'react-hook-form';
import { FormField, SelectInput } from '../../../components/form-field.js';
import { Section } from '../../../components/section.js';
import type { LimitSetForm } from '../limit-set-form.js';
import { totalWords, type TotalName } from '../limit-set-form-values.js';

const names = Object.keys(totalWords) as TotalName[];

/** Limits on totals, such as THD; none are needed. */
export function TotalRows({ form, unit }: { form: LimitSetForm; unit: string }) {
  const rows = useFieldArray({ control: form.control, name: 'totals' });
  const errors = form.formState.errors.totals;
  const left = names.filter((name) => !form.getValues('totals').some((total) => total.name === name));
  const add = () => rows.append({ name: left[0] ?? 'THD', limit: '', maxOrder: '40' });
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
                {...form.register(`totals.${index}.name`)}
              />
            </FormField>
            <FormField
              label={`Limit in ${/^T(HD|DD)$/.test(form.getValues(`totals.${index}.name`)) ? '%' : unit || 'the unit'}`}
              error={errors?.[index]?.limit?.message}
            >
              <Input inputMode="decimal" fontFamily="mono" {...form.register(`totals.${index}.limit`)} />
            </FormField>
            <FormField label="Up to order" error={errors?.[index]?.maxOrder?.message}>
              <Input inputMode="numeric" fontFamily="mono" {...form.register(`totals.${index}.maxOrder`)} />
            </FormField>
            <CloseButton
              size="sm"
              variant="ghost"
              mt={{ sm: '6' }}
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
