import { Button, Text } from '@chakra-ui/react';
import { holds, type ProjectRole, type Report } from '@overtally/contracts';
import { useState } from 'react';
import { ConfirmDialog } from '../../../components/confirm-dialog.js';
import { apiUrl } from '../../../lib/http.js';
import type { Step } from '../api/step-report.js';
import { useReportChanges } from '../hooks/use-report-changes.js';
import { StepDialog } from './step-dialog.js';

interface ReportActionsProps {
  report: Report;
  role: ProjectRole | null;
  onEdit: () => void;
  onDeleted: () => void;
}

/** What the reader may do with the report in its present state. */
export function ReportActions({ report, role, onEdit, onDeleted }: ReportActionsProps) {
  const { step, remove } = useReportChanges(report);
  const [asking, setAsking] = useState<Step | 'delete' | null>(null);
  const isDraft = report.status === 'draft';
  const inReview = report.status === 'in-review';
  const mayWrite = isDraft && holds('report.write', role);
  const mayDecide = inReview && holds('report.decide', role);
  const close = () => {
    setAsking(null);
    step.reset();
  };
  return (
    <>
      <Button asChild>
        <a href={apiUrl(`/reports/${report.id}/pdf`)} target="_blank" rel="noreferrer">
          {report.pdfSha256 ? 'Open PDF' : 'Preview PDF'}
        </a>
      </Button>
      <Button asChild>
        <a href={apiUrl(`/reports/${report.id}/pdf`)} download={fileName(report)}>
          Download PDF
        </a>
      </Button>
      {mayWrite ? (
        <>
          <Button colorPalette="over" onClick={() => setAsking('delete')}>
            Delete draft
          </Button>
          <Button onClick={onEdit}>Edit</Button>
        </>
      ) : null}
      {isDraft && holds('report.submit', role) ? (
        <Button variant="solid" onClick={() => setAsking('submit')}>
          Submit for review
        </Button>
      ) : null}
      {mayDecide ? (
        <>
          <Button onClick={() => setAsking('return')}>Return</Button>
          <Button variant="solid" onClick={() => setAsking('issue')}>
            Issue
          </Button>
        </>
      ) : null}
      {asking !== null && asking !== 'delete' ? (
        <StepDialog
          step={asking}
          onClose={close}
          pending={step.isPending}
          error={step.error}
          onConfirm={(comment) => step.mutate({ step: asking, comment }, { onSuccess: close })}
        />
      ) : null}
      <ConfirmDialog
        open={asking === 'delete'}
        onClose={close}
        title={`Delete “${report.title}”?`}
        confirmLabel="Delete the draft"
        destructive
        pending={remove.isPending}
        onConfirm={() => remove.mutate(undefined, { onSuccess: onDeleted, onSettled: close })}
      >
        <Text>
          The draft and its log go away for everyone. Recordings and verdicts stay. This cannot be taken back.
        </Text>
      </ConfirmDialog>
    </>
  );
}

const fileName = ({ number, revision, title }: Report): string =>
  number === null
    ? `draft-${title.replaceAll(/[^\p{L}\p{N}]+/gu, '-')}.pdf`
    : `${number}-rev-${revision}.pdf`;
