import { Button, Stack, Text, Textarea } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import { reportStepSchema, returnReportSchema } from '@overtally/contracts';
import { useId, type ReactNode } from 'react';
import { useForm } from 'react-hook-form';
import { FormField } from '../../../components/form-field.js';
import { FormProblem } from '../../../components/form-problem.js';
import { Modal } from '../../../components/modal.js';
import { problemText } from '../../../lib/api-problem.js';
import type { Step } from '../api/step-report.js';

interface StepDialogProps {
  step: Step;
  onClose: () => void;
  pending: boolean;
  /** Why the server refused. */
  error: unknown;
  onConfirm: (comment: string) => void;
}

const words: Record<Step, { title: string; confirm: string; comment: string; body: ReactNode }> = {
  submit: {
    title: 'Submit for review?',
    confirm: 'Submit for review',
    comment: 'Comment for the reviewer',
    body: 'A manager then issues the report or returns it. While it is in review it cannot be changed.',
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
        <li>It gets the next number of the project, under your name and the present time.</li>
        <li>
          Its figures, notes and verdicts are frozen as they stand now, whatever happens to the recordings.
        </li>
        <li>Its PDF is stored with its SHA-256, so that anyone can check a copy.</li>
        <li>It cannot be changed, returned or deleted afterwards.</li>
      </Stack>
    ),
  },
};

/** Asks before a report is moved on, and for the comment that goes with it. */
export function StepDialog({ step, onClose, pending, error, onConfirm }: StepDialogProps) {
  const id = useId();
  const form = useForm({
    resolver: zodResolver(step === 'return' ? returnReportSchema : reportStepSchema),
    defaultValues: { comment: '' },
  });
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
      <form id={id} noValidate onSubmit={form.handleSubmit((values) => onConfirm(values.comment ?? ''))}>
        <Stack gap="4">
          <FormProblem message={error ? problemText(error) : undefined} />
          <Text as="div">{body}</Text>
          <FormField
            label={comment}
            optional={step !== 'return'}
            error={form.formState.errors.comment?.message}
          >
            <Textarea rows={3} {...form.register('comment')} />
          </FormField>
        </Stack>
      </form>
    </Modal>
  );
}
