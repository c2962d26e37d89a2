import { Button, Input, Stack } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { z } from 'zod';
import { FormField } from '../../../components/form-field.js';

const checkFormSchema = z.object({
  number: z.string().trim().min(1, 'Give the number that the report has').max(40),
  code: z
    .string()
    .trim()
    .refine((code) => code.replaceAll(/[^\p{L}\p{N}]/gu, '').length === 16, {
      message: 'The code has 16 letters and digits',
    }),
});
export type CheckForm = z.infer<typeof checkFormSchema>;

interface CheckFormProps {
  initial: CheckForm;
  onCheck: (values: CheckForm) => void;
}

/** Number and check code of a printed report. */
export function CheckForm({ initial, onCheck }: CheckFormProps) {
  const form = useForm({ resolver: zodResolver(checkFormSchema), defaultValues: initial });
  const { errors } = form.formState;
  return (
    <form noValidate onSubmit={form.handleSubmit(onCheck)} aria-label="Report to check">
      <Stack gap="4">
        <FormField
          label="Report number"
          error={errors.number?.message}
          help="On the first page, such as HR-0001."
        >
          <Input autoComplete="off" spellCheck={false} {...form.register('number')} />
        </FormField>
        <FormField
          label="Check code"
          error={errors.code?.message}
          help="Beside the QR code: four groups of four. Case and dashes do not matter."
        >
          <Input autoComplete="off" spellCheck={false} fontFamily="mono" {...form.register('code')} />
        </FormField>
        <Button type="submit" variant="solid" alignSelf="flex-start">
          Check the report
        </Button>
      </Stack>
    </form>
  );
}
