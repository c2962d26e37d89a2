import { holds } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { useNavigate, useParams } from 'react-router-dom';
import { EmptyState } from '../../../components/empty-state.js';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { notifyDone } from '../../../components/notify.js';
import { PageHeader } from '../../../components/page-header.js';
import { addLimitSetVersion } from '../../../features/limits/api/add-limit-set-version.js';
import { limitSetQuery } from '../../../features/limits/api/get-limit-set.js';
import { LimitSetForm } from '../../../features/limits/components/limit-set-form.js';
import { useProject } from '../../../features/projects/hooks/use-project.js';
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
  const mayWrite = set.projectId === project.id && holds('limit-set.write', project.role);
  const toSet = (id: string) => void navigate(paths.limitSet(project.id, id));
  return (
    <>
      <PageHeader
        title={`New version of ${set.title}`}
        subtitle={`Version ${set.version + 1}; earlier versions stay as they are, and verdicts keep theirs`}
        crumb="New version"
        documentTitle={`New version of ${set.title}, ${project.name}`}
      />
      {mayWrite ? (
        <LimitSetForm
          base={set}
          submitLabel={`Save version ${set.version + 1}`}
          onSubmit={(input) => addLimitSetVersion(set.id, input)}
          onDone={(made) => {
            notifyDone(`Version ${made.version} of ${made.title} saved`);
            toSet(made.id);
          }}
          onCancel={() => toSet(set.id)}
        />
      ) : (
        <EmptyState title="This set has no new versions here">
          Analysts and managers make new versions of sets of their own project. Published sets are copied
          first.
        </EmptyState>
      )}
    </>
  );
}
