import { Button } from '@chakra-ui/react';
import { holds, reportStatusSchema, type ReportStatus } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { EmptyState } from '../../../components/empty-state.js';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { PageHeader } from '../../../components/page-header.js';
import { Segmented } from '../../../components/segmented.js';
import { useProject } from '../../../features/projects/hooks/use-project.js';
import { reportsQuery } from '../../../features/reports/api/list-reports.js';
import { ReportTable } from '../../../features/reports/components/report-table.js';
import { statusWords } from '../../../features/reports/report-words.js';
import { paths } from '../../paths.js';
import { useProjectId } from '../../use-project-id.js';

type Shown = ReportStatus | 'all';

const shownOptions: readonly { value: Shown; label: string }[] = [
  { value: 'all', label: 'All' },
  ...reportStatusSchema.options.map((value) => ({ value, label: statusWords[value] })),
];

export function Component() {
  const project = useProject(useProjectId());
  const reports = useQuery(reportsQuery(project.id));
  const [shown, setShown] = useState<Shown>('all');
  const all = reports.data ?? [];
  const found = all.filter((report) => shown === 'all' || report.status === shown);
  const mayWrite = holds('report.write', project.role);
  const begin = (
    <Button asChild variant="solid">
      <Link to={paths.newReport(project.id)}>New report</Link>
    </Button>
  );
  return (
    <>
      <PageHeader
        title="Reports"
        subtitle={all.length > 0 ? countWords(all.map(({ status }) => status)) : undefined}
        documentTitle={`Reports, ${project.name}`}
        actions={
          all.length > 0 ? (
            <>
              <Segmented label="Reports shown" value={shown} options={shownOptions} onChange={setShown} />
              {mayWrite ? begin : null}
            </>
          ) : undefined
        }
      />
      {reports.isPending ? <LoadingState label="Loading the reports" /> : null}
      {reports.isError ? <ErrorState error={reports.error} onRetry={() => void reports.refetch()} /> : null}
      {reports.isSuccess && all.length === 0 ? (
        <EmptyState title="No report yet" actions={mayWrite ? begin : undefined}>
          {mayWrite
            ? 'Judge recordings on their sheets first; a report puts their verdicts together, goes through review and is issued with a number.'
            : 'Analysts and managers write reports; an issued one can be read here and checked by its SHA-256.'}
        </EmptyState>
      ) : null}
      {found.length > 0 ? (
        <ReportTable reports={found} reportTo={(id) => paths.report(project.id, id)} />
      ) : null}
      {all.length > 0 && found.length === 0 ? (
        <EmptyState
          title="None in this state"
          actions={<Button onClick={() => setShown('all')}>Show all</Button>}
        >
          {`${all.length === 1 ? 'The one report' : `All ${all.length} reports`} of the project are in other states.`}
        </EmptyState>
      ) : null}
    </>
  );
}

/** "4 reports, 1 in review, 2 issued" */
function countWords(states: readonly ReportStatus[]): string {
  const count = (status: ReportStatus) => states.filter((state) => state === status).length;
  const parts = (['draft', 'in-review', 'issued'] as const)
    .filter((status) => count(status) > 0)
    .map(
      (status) => `${count(status)} ${status === 'draft' ? 'in draft' : statusWords[status].toLowerCase()}`,
    );
  return [states.length === 1 ? '1 report' : `${states.length} reports`, ...parts].join(', ');
}
