import { Button } from '@chakra-ui/react';
import { holds } from '@overtally/contracts';
import { useQueryClient } from '@tanstack/react-query';
import { Link, useNavigate, useSearchParams } from 'react-router-dom';
import { EmptyState } from '../../../components/empty-state.js';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { PageHeader } from '../../../components/page-header.js';
import { useProject } from '../../../features/projects/hooks/use-project.js';
import { createReport } from '../../../features/reports/api/write-report.js';
import { ReportForm } from '../../../features/reports/components/report-form.js';
import { paths } from '../../paths.js';
import { useProjectId } from '../../use-project-id.js';
import { useJudged } from './use-judged.js';

export function Component() {
  const project = useProject(useProjectId());
  const navigate = useNavigate();
  const queryClient = useQueryClient();
  const [search] = useSearchParams();
  const judged = useJudged(project.id);
  return (
    <>
      <PageHeader
        title="New report"
        subtitle="A draft, to be changed until it is submitted for review"
        crumb="New report"
        documentTitle={`New report, ${project.name}`}
      />
      {!holds('report.write', project.role) ? (
        <EmptyState title="Only analysts and managers write reports">
          Ask one of them, named under Members.
        </EmptyState>
      ) : judged.error ? (
        <ErrorState error={judged.error} onRetry={judged.refetch} />
      ) : !judged.data ? (
        <LoadingState label="Loading the verdicts" />
      ) : judged.data.verdicts.length + judged.data.studies.length === 0 ? (
        <EmptyState
          title="Nothing to report yet"
          actions={
            <Button asChild variant="solid">
              <Link to={paths.recordings(project.id)}>Go to the recordings</Link>
            </Button>
          }
        >
          A report is made of verdicts, and of studies as predictions. Open a recording and judge it by a
          limit set; then come back.
        </EmptyState>
      ) : (
        <ReportForm
          initial={{
            ...{ title: '', summary: '', deviations: '', recipients: [], studyVersionIds: [] },
            verdictIds: chosen(search, judged.data.verdicts),
          }}
          verdicts={judged.data.verdicts}
          recordings={judged.data.recordings}
          studies={judged.data.studies}
          submitLabel="Create the draft"
          save={(input) => createReport(project.id, input)}
          onSaved={(report) => {
            void queryClient.invalidateQueries({ queryKey: ['projects', project.id] });
            void navigate(paths.report(project.id, report.id));
          }}
          onCancel={() => void navigate(paths.reports(project.id))}
        />
      )}
    </>
  );
}

/** Verdicts that the address names, as far as the project has them. */
function chosen(search: URLSearchParams, verdicts: readonly { id: string }[]): string[] {
  const named = new Set((search.get('verdicts') ?? '').split(','));
  return verdicts.map(({ id }) => id).filter((id) => named.has(id));
}
