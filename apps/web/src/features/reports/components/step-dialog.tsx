import { Button, Stack, Text, Textarea } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import {
  issueReportSchema,
  reportStepSchema,
  returnReportSchema,
  submitReportSchema,
  type Report,
} from '@overtally/contracts';
import { useId, type ReactNode } from 'react';
import { useForm } from 'react-hook-form';
import { z } from 'zod';
import { FormField } from '../../../components/form-field.js';
import { FormProblem } from '../../../components/form-problem.js';
import { Modal } from '../../../components/modal.js';
import { problemText } from '../../../lib/api-problem.js';
import type { StepName } from '../api/step-report.js';

type StepInput = {
  comment: string;
  /** In words of the step: why it is revised, or why results stand with overdue calibration. */
  revisionReason?: string;
  overdueReason?: string;
};

interface StepDialogProps {
  step: StepName;
  report: Report;
  onClose: () => void;
  pending: boolean;
  /** Why the server refused. */
  error: unknown;
  onConfirm: (input: StepInput) => void;
}

const words: Record<StepName, { title: string; confirm: string; comment: string; body: ReactNode }> = {
  submit: {
    title: 'Submit for review?',
    confirm: 'Submit for review',
    comment: 'Comment for the reviewer',
    body: 'A manager then issues the report or returns it. While it is in review it cannot be changed.',
  },
  withdraw: {
    title: 'Withdraw from review?',
    confirm: 'Withdraw the report',
    comment: 'Comment',
    body: 'The report becomes a draft again, to be changed and submitted anew.',
  },
  return: {
    title: 'Return to its author',
    confirm: 'Return the report',
    comment: 'What must be mended',
    body: 'The report becomes a draft again. What you write stays in its log.',
  },
  issue: {
    title: 'Issue this report?',
    confirm: 'Issue the report',
    comment: 'Comment',
    body: (
      <Stack as="ul" gap="1" pl="5" listStyleType="disc">
        <li>It gets its number and a check code, under your name and the present time.</li>
        <li>
          Its figures, notes and verdicts are frozen as they stand now, whatever happens to the recordings.
          Nothing it speaks of can be deleted.
        </li>
        <li>Its PDF is stored with its SHA-256, so that anyone can check a copy.</li>
        <li>It cannot be changed, returned or deleted afterwards, only replaced by a new revision.</li>
      </Stack>
    ),
  },
};

/** Asks before a report is moved on, and for what goes with it. */
export function StepDialog({ step, report, onClose, pending, error, onConfirm }: StepDialogProps) {
  const id = useId();
  const asked = asksFor(step, report);
  const form = useForm<Partial<StepInput>, unknown, StepInput>({
    resolver: zodResolver(schemaOf(step, report)),
    defaultValues: {
      comment: '',
      ...(asked.revisionReason && { revisionReason: report.revisionReason ?? '' }),
      ...(asked.overdue && { overdueReason: '' }),
    },
  });
  const { errors } = form.formState;
  const { title, confirm, comment, body } = words[step];
  return (
    <Modal
      open
      onClose={onClose}
      title={title}
      role="alertdialog"
      footer={
        <>
          <Button onClick={onClose}>Cancel</Button>
          <Button type="submit" form={id} variant="solid" loading={pending}>
            {confirm}
          </Button>
        </>
      }
    >
      <form id={id} noValidate onSubmit={form.handleSubmit((values) => onConfirm(values))}>
        <Stack gap="4">
          <FormProblem message={error ? problemText(error) : undefined} />
          <Text as="div">{body}</Text>
          {asked.revisionReason ? (
            <FormField
              label="Reason for the revision"
              error={errors.revisionReason?.message}
              help="The new revision prints it."
            >
              <Textarea rows={2} {...form.register('revisionReason')} />
            </FormField>
          ) : null}
          {asked.overdue ? (
            <FormField
              label="Why the results stand although calibration was overdue"
              error={errors.overdueReason?.message}
              help={`${asked.overdue}. The report prints what you write.`}
            >
              <Textarea rows={3} {...form.register('overdueReason')} />
            </FormField>
          ) : null}
          <FormField label={comment} optional={step !== 'return'} error={errors.comment?.message}>
            <Textarea rows={3} {...form.register('comment')} />
          </FormField>
        </Stack>
      </form>
    </Modal>
  );
}

/** What a step asks for beside the comment; `overdue` names the instruments. */
function asksFor(step: StepName, { replaces, cautions }: Report) {
  const overdue = cautions.filter(({ code }) => code === 'calibration-overdue');
  return {
    revisionReason: step === 'submit' && replaces !== null,
    overdue: step === 'issue' ? [...new Set(overdue.map(({ message }) => message))].join('. ') : '',
  };
}

function schemaOf(step: StepName, report: Report): z.ZodType<StepInput, Partial<StepInput>> {
  const asked = asksFor(step, report);
  if (step === 'return') return returnReportSchema;
  if (asked.revisionReason) {
    const reason = z.string().trim().min(1, 'Say why the report is revised').max(2000);
    return submitReportSchema.extend({ revisionReason: reason });
  }
  if (asked.overdue) {
    return issueReportSchema.extend({ overdueReason: issueReportSchema.shape.overdueReason.unwrap() });
  }
  return reportStepSchema;
}
