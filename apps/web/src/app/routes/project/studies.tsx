import { Button } from '@chakra-ui/react';
import { holds } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { EmptyState } from '../../../components/empty-state.js';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { PageHeader } from '../../../components/page-header.js';
import { useProject } from '../../../features/projects/hooks/use-project.js';
import { studiesQuery } from '../../../features/studies/api/list-studies.js';
import { StudyTable } from '../../../features/studies/components/study-table.js';
import { paths } from '../../paths.js';
import { useProjectId } from '../../use-project-id.js';

export function Component() {
  const project = useProject(useProjectId());
  const studies = useQuery(studiesQuery(project.id));
  const all = studies.data ?? [];
  const begin = (
    <Button asChild variant="solid">
      <Link to={paths.newStudy(project.id)}>New study</Link>
    </Button>
  );
  return (
    <>
      <PageHeader
        title="Studies"
        subtitle="Predictions of what filters, reactors and other stages make of a signal"
        documentTitle={`Studies, ${project.name}`}
        actions={all.length > 0 ? begin : undefined}
      />
      {studies.isPending ? <LoadingState label="Loading the studies" /> : null}
      {studies.isError ? <ErrorState error={studies.error} onRetry={() => void studies.refetch()} /> : null}
      {studies.isSuccess && all.length === 0 ? (
        <EmptyState title="No study yet" actions={begin}>
          {holds('study.write', project.role)
            ? 'Put a filter or another stage behind a recorded channel, a textbook wave or typed harmonics, and see the output before it is built.'
            : 'Analysts and managers save studies; you can try stages and see what they do without saving.'}
        </EmptyState>
      ) : null}
      {all.length > 0 ? <StudyTable studies={all} studyTo={(id) => paths.study(project.id, id)} /> : null}
    </>
  );
}
