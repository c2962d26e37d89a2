import type { Report } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { useNavigate, useParams } from 'react-router-dom';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { PageHeader } from '../../../components/page-header.js';
import { useAccount } from '../../../features/account/hooks/use-account.js';
import { useProject } from '../../../features/projects/hooks/use-project.js';
import { reportQuery } from '../../../features/reports/api/get-report.js';
import { ReportActions } from '../../../features/reports/components/report-actions.js';
import { ReportDeliveries } from '../../../features/reports/components/report-deliveries.js';
import { ReportForm } from '../../../features/reports/components/report-form.js';
import { ReportSheet } from '../../../features/reports/components/report-sheet.js';
import { useReportChanges } from '../../../features/reports/hooks/use-report-changes.js';
import { standingWords } from '../../../features/reports/report-words.js';
import { paths } from '../../paths.js';
import { useProjectId } from '../../use-project-id.js';
import { useJudged } from './use-judged.js';

export function Component() {
  const { reportId = '' } = useParams();
  const { data: report, ...query } = useQuery(reportQuery(reportId));
  if (report) return <ReportPage report={report} />;
  return query.isError ? (
    <ErrorState error={query.error} onRetry={() => void query.refetch()} />
  ) : (
    <LoadingState label="Loading the report" lines={8} />
  );
}

function ReportPage({ report }: { report: Report }) {
  const account = useAccount();
  const project = useProject(useProjectId());
  const navigate = useNavigate();
  const [editing, setEditing] = useState(false);
  const isEditing = editing && report.status === 'draft';
  return (
    <>
      <PageHeader
        title={report.title}
        subtitle={
          report.number ? `${report.number}, revision ${report.revision}` : `Revision ${report.revision}`
        }
        crumb={report.number ?? standingWords(report)}
        documentTitle={`${report.number ?? report.title}, ${project.name}`}
        actions={
          isEditing ? undefined : (
            <ReportActions
              report={report}
              role={project.role}
              personId={account.id}
              preparerMayIssue={project.preparerMayIssue}
              onEdit={() => setEditing(true)}
              onDeleted={() => void navigate(paths.reports(project.id))}
              onRevised={({ id }) => void navigate(paths.report(project.id, id))}
            />
          )
        }
      />
      {isEditing ? (
        <EditDraft report={report} onDone={() => setEditing(false)} />
      ) : (
        <>
          <ReportSheet report={report} role={project.role} reportTo={(id) => paths.report(project.id, id)} />
          <ReportDeliveries report={report} role={project.role} isAdministrator={account.isAdministrator} />
        </>
      )}
    </>
  );
}

function EditDraft({ report, onDone }: { report: Report; onDone: () => void }) {
  const judged = useJudged(report.projectId);
  const { update } = useReportChanges(report);
  if (judged.error) return <ErrorState error={judged.error} onRetry={judged.refetch} />;
  if (!judged.data) return <LoadingState label="Loading the verdicts" />;
  const { title, summary, deviations, recipients, verdictIds, studyVersionIds } = report;
  return (
    <ReportForm
      initial={{
        ...{ title, summary, deviations, recipients, verdictIds, studyVersionIds },
        ...(report.replaces && { revisionReason: report.revisionReason ?? '' }),
      }}
      verdicts={judged.data.verdicts}
      recordings={judged.data.recordings}
      studies={judged.data.studies}
      submitLabel="Save the draft"
      // Verdicts that stay are not sent: one that is outdated would hinder saving the words.
      save={({ verdictIds: chosen, ...words }) =>
        update(isSame(chosen, verdictIds) ? words : { ...words, verdictIds: chosen })
      }
      onSaved={onDone}
      onCancel={onDone}
    />
  );
}

const isSame = (a: readonly string[], b: readonly string[]): boolean =>
  a.length === b.length && a.every((id, index) => id === b[index]);
