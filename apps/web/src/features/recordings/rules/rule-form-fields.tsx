import { Box, Grid, Input, Text } from '@chakra-ui/react';
import type { UseFormReturn } from 'react-hook-form';
import { FormField } from '../../../components/form-field.js';
import type { RuleFields } from './rule-fields.js';

interface RuleFormFieldsProps {
  form: UseFormReturn<RuleFields>;
  /** Names of the columns that files can be bound to; null where there are none. */
  columnNames: readonly string[] | null;
}

/** Name of a rule, and which files it is for. */
export function RuleFormFields({ form, columnNames }: RuleFormFieldsProps) {
  const { errors } = form.formState;
  return (
    <>
      <Grid templateColumns={{ base: '1fr', md: '1fr 1fr' }} gap="3">
        <FormField label="Name of the rule" error={errors.name?.message}>
          <Input autoComplete="off" {...form.register('name')} />
        </FormField>
        <FormField
          label="For files named"
          help="* stands for any text, ? for one character; case does not matter."
          error={errors.fileNamePattern?.message}
        >
          <Input autoComplete="off" fontFamily="mono" {...form.register('fileNamePattern')} />
        </FormField>
      </Grid>
      {columnNames ? (
        <Box>
          <label>
            <Box as="span" display="inline-flex" alignItems="baseline" gap="2">
              <input type="checkbox" {...form.register('bindsColumns')} />
              Only files with these columns
            </Box>
          </label>
          <Text color="inkSoft" fontSize="13px" ml="6" lineClamp={2} title={columnNames.join(', ')}>
            {columnNames.join(', ')}
          </Text>
        </Box>
      ) : null}
    </>
  );
}
