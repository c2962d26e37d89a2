import { Button, Input, Stack, Textarea } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import { createReportSchema, type CreateReport, type Report, type Verdict } from '@overtally/contracts';
import { useMutation } from '@tanstack/react-query';
import { useController, useForm } from 'react-hook-form';
import { FormField } from '../../../components/form-field.js';
import { FormProblem } from '../../../components/form-problem.js';
import { setFormProblem } from '../../../lib/form-errors.js';
import type { RecordingName } from '../verdict-groups.js';
import { VerdictPicker } from './verdict-picker.js';

interface ReportFormProps {
  initial: CreateReport;
  verdicts: readonly Verdict[];
  recordings: readonly RecordingName[];
  /** Names the act: "Create the draft". */
  submitLabel: string;
  save: (input: CreateReport) => Promise<Report>;
  onSaved: (report: Report) => void;
  onCancel: () => void;
}

/** Title, summary and verdicts of a draft. */
export function ReportForm(props: ReportFormProps) {
  const form = useForm({ resolver: zodResolver(createReportSchema), defaultValues: props.initial });
  const { errors } = form.formState;
  const { field } = useController({ control: form.control, name: 'verdictIds' });
  const write = useMutation({
    mutationFn: props.save,
    onSuccess: props.onSaved,
    onError: (error) => setFormProblem(form, error),
  });
  return (
    <form noValidate onSubmit={form.handleSubmit((values) => write.mutate(values))}>
      <Stack gap="5" maxW="3xl">
        <FormField label="Title" error={errors.title?.message}>
          <Input autoComplete="off" {...form.register('title')} />
        </FormField>
        <FormField
          label="Summary"
          optional
          error={errors.summary?.message}
          help="What the reader needs to know first; it stands on the first page."
        >
          <Textarea rows={4} {...form.register('summary')} />
        </FormField>
        <VerdictPicker
          verdicts={props.verdicts}
          recordings={props.recordings}
          value={field.value}
          onChange={field.onChange}
          error={errors.verdictIds?.message}
        />
        <FormProblem message={errors.root?.message} />
        <Stack direction="row" gap="2">
          <Button type="submit" variant="solid" loading={write.isPending}>
            {props.submitLabel}
          </Button>
          <Button onClick={props.onCancel}>Cancel</Button>
        </Stack>
      </Stack>
    </form>
  );
}
