import { Box, Button, Flex, Input, Text } from '@chakra-ui/react';
import type { CreateReport } from '@overtally/contracts';
import { useFieldArray, type UseFormReturn } from 'react-hook-form';
import { FormField } from '../../../components/form-field.js';
import type { ReportFormInput } from './report-form.js';

interface RecipientsFieldProps {
  form: UseFormReturn<ReportFormInput, unknown, CreateReport & { revisionReason?: string }>;
}

/** To whom the report goes by e-mail once it is issued. */
export function RecipientsField({ form }: RecipientsFieldProps) {
  const { fields, append, remove } = useFieldArray({ control: form.control, name: 'recipients' });
  const errors = form.formState.errors.recipients;
  return (
    <Box as="fieldset">
      <Text as="legend" fontWeight="600">
        Recipients
      </Text>
      <Text color="inkSoft" fontSize="13px" mb="2">
        Each gets the PDF by e-mail when the report is issued.
      </Text>
      {fields.map((field, index) => (
        <Flex key={field.id} gap="3" mb="2" wrap="wrap" align="flex-start">
          <Box flex="1 1 180px">
            <FormField
              label={`Name of recipient ${index + 1}`}
              optional
              error={errors?.[index]?.name?.message}
            >
              <Input autoComplete="off" {...form.register(`recipients.${index}.name`)} />
            </FormField>
          </Box>
          <Box flex="1 1 220px">
            <FormField label={`E-mail of recipient ${index + 1}`} error={errors?.[index]?.email?.message}>
              <Input type="email" autoComplete="off" {...form.register(`recipients.${index}.email`)} />
            </FormField>
          </Box>
          <Button
            variant="ghost"
            alignSelf={{ sm: 'flex-end' }}
            aria-label={`Remove recipient ${index + 1}`}
            onClick={() => remove(index)}
          >
            Remove
          </Button>
        </Flex>
      ))}
      {(errors?.root?.message ?? errors?.message) ? (
        <Text color="over" role="alert" mb="2">
          {errors?.root?.message ?? errors?.message}
        </Text>
      ) : null}
      <Button disabled={fields.length >= 20} onClick={() => append({ name: '', email: '' })}>
        Add a recipient
      </Button>
    </Box>
  );
}
