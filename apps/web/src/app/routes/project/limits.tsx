import { Button } from '@chakra-ui/react';
import { holds } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { EmptyState } from '../../../components/empty-state.js';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { PageHeader } from '../../../components/page-header.js';
import { limitSetsQuery } from '../../../features/limits/api/list-limit-sets.js';
import { LimitSetList } from '../../../features/limits/components/limit-set-list.js';
import { useProject } from '../../../features/projects/hooks/use-project.js';
import { paths } from '../../paths.js';
import { useProjectId } from '../../use-project-id.js';

export function Component() {
  const project = useProject(useProjectId());
  const limitSets = useQuery(limitSetsQuery(project.id));
  const mayWrite = holds('limit-set.write', project.role);
  const own = limitSets.data?.filter((set) => set.projectId !== null).length ?? 0;
  const create = (
    <Button asChild variant="solid">
      <Link to={paths.newLimitSet(project.id)}>New limit set</Link>
    </Button>
  );
  return (
    <>
      <PageHeader
        title="Limits"
        subtitle={
          limitSets.isSuccess ? `${limitSets.data.length - own} published, ${own} of this project` : undefined
        }
        documentTitle={`Limits, ${project.name}`}
        actions={mayWrite ? create : undefined}
      />
      {limitSets.isPending ? <LoadingState label="Loading the limit sets" /> : null}
      {limitSets.isError ? (
        <ErrorState error={limitSets.error} onRetry={() => void limitSets.refetch()} />
      ) : null}
      {limitSets.isSuccess ? (
        <LimitSetList
          sets={limitSets.data}
          setTo={(id) => paths.limitSet(project.id, id)}
          noneOwn={
            <EmptyState title="No limit set of this project's own" actions={mayWrite ? create : undefined}>
              {mayWrite
                ? 'Enter limits that a customer or a contract asks for, order by order or pasted from a spreadsheet.'
                : 'Analysts and managers enter limits that a customer or a contract asks for.'}
            </EmptyState>
          }
        />
      ) : null}
    </>
  );
}
