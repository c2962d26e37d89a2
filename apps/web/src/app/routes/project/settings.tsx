import { holds } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { EmptyState } from '../../../components/empty-state.js';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { PageHeader } from '../../../components/page-header.js';
import { limitSetsQuery } from '../../../features/limits/api/list-limit-sets.js';
import { ArchiveProject } from '../../../features/projects/components/archive-project.js';
import { ProjectSettingsForm } from '../../../features/projects/components/project-settings-form.js';
import { useProject } from '../../../features/projects/hooks/use-project.js';
import { useProjectId } from '../../use-project-id.js';

export function Component() {
  const project = useProject(useProjectId());
  const limitSets = useQuery(limitSetsQuery(project.id));
  const mayChange = holds('project.update', project.role);
  return (
    <>
      <PageHeader title="Settings" documentTitle={`Settings, ${project.name}`} />
      {!mayChange ? (
        <EmptyState title="Only managers change a project">Ask a manager, named under Members.</EmptyState>
      ) : limitSets.isPending ? (
        <LoadingState label="Loading the settings" />
      ) : limitSets.isError ? (
        <ErrorState error={limitSets.error} onRetry={() => void limitSets.refetch()} />
      ) : (
        <>
          <ProjectSettingsForm project={project} limitSets={limitSets.data} />
          <ArchiveProject project={project} />
        </>
      )}
    </>
  );
}
