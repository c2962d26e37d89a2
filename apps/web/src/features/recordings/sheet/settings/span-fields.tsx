import { Grid, Input } from '@chakra-ui/react';
import type { UseFormReturn } from 'react-hook-form';
import { FormField, SelectInput } from '../../../../components/form-field.js';
import { formatDuration } from '../../../../lib/format.js';
import type { SettingsForm } from './settings-form.js';

interface SpanFieldsProps {
  form: UseFormReturn<SettingsForm>;
  durationS: number | null;
}

/** The whole record, or a part of it; the part in view is filled in. */
export function SpanFields({ form, durationS }: SpanFieldsProps) {
  const { errors } = form.formState;
  const extents = [
    { value: 'whole', label: `The whole record, ${formatDuration(durationS)}` },
    { value: 'part', label: 'A part of it' },
  ];
  return (
    <Grid gap="4" templateColumns={{ base: '1fr', sm: '2fr 1fr 1fr' }}>
      <FormField label="Record" error={errors.extent?.message}>
        <SelectInput options={extents} {...form.register('extent')} />
      </FormField>
      {form.watch('extent') === 'part' ? (
        <>
          <FormField label="From, s" error={errors.fromS?.message}>
            <Input fontFamily="mono" inputMode="decimal" {...form.register('fromS')} />
          </FormField>
          <FormField label="To, s" error={errors.toS?.message}>
            <Input fontFamily="mono" inputMode="decimal" {...form.register('toS')} />
          </FormField>
        </>
      ) : null}
    </Grid>
  );
}
