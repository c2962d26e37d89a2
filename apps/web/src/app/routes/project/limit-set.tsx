import { holds } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { useNavigate, useParams } from 'react-router-dom';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { PageHeader } from '../../../components/page-header.js';
import { limitSetQuery } from '../../../features/limits/api/get-limit-set.js';
import { DeleteLimitSet } from '../../../features/limits/components/delete-limit-set.js';
import { LimitSetSheet } from '../../../features/limits/components/limit-set-sheet.js';
import { useProject } from '../../../features/projects/hooks/use-project.js';
import { limitSetName } from '../../../lib/limit-set-name.js';
import { paths } from '../../paths.js';
import { useProjectId } from '../../use-project-id.js';

export function Component() {
  const { limitSetId = '' } = useParams();
  const project = useProject(useProjectId());
  const navigate = useNavigate();
  const { data: set, ...limitSet } = useQuery(limitSetQuery(limitSetId));
  if (!set) {
    return limitSet.isError ? (
      <ErrorState error={limitSet.error} onRetry={() => void limitSet.refetch()} />
    ) : (
      <LoadingState label="Loading the limit set" />
    );
  }
  const mayDelete = set.projectId === project.id && holds('limit-set.write', project.role);
  return (
    <>
      <PageHeader
        title={limitSetName(set)}
        subtitle={set.appliesWhen || undefined}
        crumb={set.title}
        documentTitle={`${set.title}, ${project.name}`}
        actions={
          mayDelete ? (
            <DeleteLimitSet set={set} onDeleted={() => void navigate(paths.limits(project.id))} />
          ) : undefined
        }
      />
      <LimitSetSheet set={set} />
    </>
  );
}
