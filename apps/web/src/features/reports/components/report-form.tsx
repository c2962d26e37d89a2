import { Button, Input, Stack, Textarea } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import {
  createReportSchema,
  updateReportSchema,
  type CreateReport,
  type Report,
  type StudyListItem,
  type Verdict,
} from '@overtally/contracts';
import { useMutation } from '@tanstack/react-query';
import { useController, useForm } from 'react-hook-form';
import type { z } from 'zod';
import { FormField } from '../../../components/form-field.js';
import { FormProblem } from '../../../components/form-problem.js';
import { setFormProblem } from '../../../lib/form-errors.js';
import type { RecordingName } from '../verdict-groups.js';
import { RecipientsField } from './recipients-field.js';
import { StudyPicker } from './study-picker.js';
import { VerdictPicker } from './verdict-picker.js';

const { revisionReason } = updateReportSchema.shape;
const reportFormSchema = createReportSchema.extend({ revisionReason });
export type ReportFormInput = z.input<typeof reportFormSchema>;

interface ReportFormProps {
  /** With a reason, even an empty one, for a new revision. */
  initial: CreateReport & { revisionReason?: string };
  verdicts: readonly Verdict[];
  recordings: readonly RecordingName[];
  studies: readonly StudyListItem[];
  /** Names the act: "Create the draft". */
  submitLabel: string;
  save: (input: CreateReport & { revisionReason?: string }) => Promise<Report>;
  onSaved: (report: Report) => void;
  onCancel: () => void;
}

/** Title, words, recipients and verdicts of a draft. */
export function ReportForm(props: ReportFormProps) {
  const form = useForm<ReportFormInput, unknown, CreateReport & { revisionReason?: string }>({
    resolver: zodResolver(reportFormSchema),
    defaultValues: props.initial,
  });
  const { errors } = form.formState;
  const { field } = useController({ control: form.control, name: 'verdictIds' });
  const { field: studyField } = useController({ control: form.control, name: 'studyVersionIds' });
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
        {props.initial.revisionReason === undefined ? null : (
          <FormField
            label="Reason for the revision"
            error={errors.revisionReason?.message}
            help="Needed before it is submitted; the new revision prints it."
          >
            <Textarea rows={2} {...form.register('revisionReason')} />
          </FormField>
        )}
        <FormField
          label="Summary"
          optional
          error={errors.summary?.message}
          help="What the reader needs to know first; it stands on the first page."
        >
          <Textarea rows={4} {...form.register('summary')} />
        </FormField>
        <FormField
          label="Deviations"
          optional
          error={errors.deviations?.message}
          help="Additions to, deviations or exclusions from the method."
        >
          <Textarea rows={3} {...form.register('deviations')} />
        </FormField>
        <RecipientsField form={form} />
        <VerdictPicker
          verdicts={props.verdicts}
          recordings={props.recordings}
          value={field.value ?? []}
          onChange={field.onChange}
          error={errors.verdictIds?.message}
        />
        <StudyPicker
          studies={props.studies}
          value={studyField.value ?? []}
          onChange={studyField.onChange}
          error={errors.studyVersionIds?.message}
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
