import { Box, Grid, Heading, Input } from '@chakra-ui/react';
import { quantitySchema } from '@overtally/contracts';
import type { UseFormReturn } from 'react-hook-form';
import { FormField, SelectInput } from '../../../../components/form-field.js';
import { quantityWords } from '../../charts/words.js';
import type { EditValues } from './edit-values.js';

const quantities = quantitySchema.options.map((value) => ({ value, label: quantityWords[value] }));

/** Name and scaling of one channel. */
export function ChannelFields({ form, at }: { form: UseFormReturn<EditValues>; at: number }) {
  const errors = form.formState.errors.channels?.[at];
  const field = (key: 'name' | 'unit' | 'gain' | 'offset') => form.register(`channels.${at}.${key}`);
  return (
    <Box as="fieldset" borderTopWidth="1px" borderColor="rule" pt="3">
      <Heading as="legend" fontSize="sm" float="left" w="full" mb="2">
        Channel {at + 1}
      </Heading>
      <Grid gap="3" templateColumns={{ base: '1fr 1fr', md: '2fr 2fr 1fr 1.3fr 1.3fr' }} clear="both">
        <FormField label="Name" error={errors?.name?.message}>
          <Input autoComplete="off" {...field('name')} />
        </FormField>
        <FormField label="Quantity" error={errors?.quantity?.message}>
          <SelectInput options={quantities} {...form.register(`channels.${at}.quantity`)} />
        </FormField>
        <FormField label="Unit" error={errors?.unit?.message}>
          <Input autoComplete="off" {...field('unit')} />
        </FormField>
        <FormField label="Gain" error={errors?.gain?.message}>
          <Input inputMode="decimal" fontFamily="mono" {...field('gain')} />
        </FormField>
        <FormField label="Offset" error={errors?.offset?.message}>
          <Input inputMode="decimal" fontFamily="mono" {...field('offset')} />
        </FormField>
      </Grid>
    </Box>
  );
}
