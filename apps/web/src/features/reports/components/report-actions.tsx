import { Button, Text } from '@chakra-ui/react';
import { holds, type ProjectRole, type Report } from '@overtally/contracts';
import { useId, useState } from 'react';
import { ConfirmDialog } from '../../../components/confirm-dialog.js';
import { apiUrl } from '../../../lib/http.js';
import type { StepName } from '../api/step-report.js';
import { issueHindrance } from '../issue-hindrance.js';
import { useReportChanges } from '../hooks/use-report-changes.js';
import { StepDialog } from './step-dialog.js';

interface ReportActionsProps {
  report: Report;
  role: ProjectRole | null;
  personId: string;
  /** The rule of the project on who issues. */
  preparerMayIssue: boolean;
  onEdit: () => void;
  onDeleted: () => void;
  onRevised: (revision: Report) => void;
}

/** What the reader may do with the report in its present state. */
export function ReportActions(props: ReportActionsProps) {
  const { report, role, personId, preparerMayIssue, onEdit, onDeleted, onRevised } = props;
  const hintId = useId();
  const { step, remove, revise } = useReportChanges(report);
  const [asking, setAsking] = useState<StepName | 'delete' | null>(null);
  const isDraft = report.status === 'draft';
  const inReview = report.status === 'in-review';
  const mayWrite = isDraft && holds('report.write', role);
  const mayDecide = inReview && holds('report.decide', role);
  const isOwn = report.preparedBy.id === personId || report.submittedBy?.id === personId;
  const hindrance = mayDecide ? issueHindrance(report, { personId, preparerMayIssue }) : null;
  const mayRevise = report.status === 'issued' && !report.replacedBy && holds('report.write', role);
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
      {inReview && isOwn && holds('report.submit', role) ? (
        <Button onClick={() => setAsking('withdraw')}>Withdraw</Button>
      ) : null}
      {mayDecide ? (
        <>
          <Button onClick={() => setAsking('return')}>Return</Button>
          <Button
            variant="solid"
            disabled={hindrance !== null}
            aria-describedby={hindrance ? hintId : undefined}
            onClick={() => setAsking('issue')}
          >
            Issue
          </Button>
        </>
      ) : null}
      {mayRevise ? (
        <Button loading={revise.isPending} onClick={() => revise.mutate(undefined, { onSuccess: onRevised })}>
          Make a new revision
        </Button>
      ) : null}
      {hindrance ? (
        <Text id={hintId} flexBasis="100%" color="inkSoft" fontSize="13px" maxW="75ch">
          {hindrance}
        </Text>
      ) : null}
      {asking !== null && asking !== 'delete' ? (
        <StepDialog
          step={asking}
          report={report}
          onClose={close}
          pending={step.isPending}
          error={step.error}
          onConfirm={(input) => step.mutate({ step: asking, input }, { onSuccess: close })}
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
