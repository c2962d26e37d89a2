import { Box, Button, Textarea } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import { commentReportSchema, type Report } from '@overtally/contracts';
import { useForm } from 'react-hook-form';
import { FormField } from '../../../components/form-field.js';
import { FormProblem } from '../../../components/form-problem.js';
import { setFormProblem } from '../../../lib/form-errors.js';
import { useReportChanges } from '../hooks/use-report-changes.js';

/** Words beside a report that change nothing of it; guests do not see them. */
export function CommentForm({ report }: { report: Report }) {
  const form = useForm({ resolver: zodResolver(commentReportSchema), defaultValues: { comment: '' } });
  const { comment } = useReportChanges(report);
  const { errors } = form.formState;
  const send = form.handleSubmit((values) =>
    comment.mutate(values.comment, {
      onSuccess: () => form.reset(),
      onError: (error) => setFormProblem(form, error),
    }),
  );
  return (
    <Box mt="4">
      <form noValidate onSubmit={send} aria-label="New comment">
        <FormField
          label="Comment"
          error={errors.comment?.message}
          help="For colleagues; it is not printed, and guests do not see it."
        >
          <Textarea rows={2} {...form.register('comment')} />
        </FormField>
        <FormProblem message={errors.root?.message} />
        <Button type="submit" mt="2" loading={comment.isPending}>
          Add comment
        </Button>
      </form>
    </Box>
  );
}
