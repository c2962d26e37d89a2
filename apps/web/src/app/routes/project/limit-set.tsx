import { holds } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { useNavigate, useParams } from 'react-router-dom';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { notifyDone } from '../../../components/notify.js';
import { PageHeader } from '../../../components/page-header.js';
import { limitSetQuery } from '../../../features/limits/api/get-limit-set.js';
import { LimitSetActions } from '../../../features/limits/components/limit-set-actions.js';
import { LimitSetVersions } from '../../../features/limits/components/limit-set-versions.js';
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
  return (
    <>
      <PageHeader
        title={limitSetName(set)}
        subtitle={set.appliesWhen || undefined}
        crumb={set.title}
        documentTitle={`${set.title}, ${project.name}`}
        actions={
          <LimitSetActions
            projectId={project.id}
            set={set}
            mayWrite={holds('limit-set.write', project.role)}
            newVersionTo={paths.newLimitSetVersion(project.id, set.id)}
            onCloned={(made) => {
              notifyDone(`${made.title} made`);
              void navigate(paths.limitSet(project.id, made.id));
            }}
            onDeleted={() => void navigate(paths.limits(project.id))}
          />
        }
      />
      <LimitSetVersions set={set} setTo={(id) => paths.limitSet(project.id, id)} />
      <LimitSetSheet set={set} />
    </>
  );
}
