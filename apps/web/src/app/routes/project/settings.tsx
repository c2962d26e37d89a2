import { Text } from '@chakra-ui/react';
import { holds, type Project } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { PageHeader } from '../../../components/page-header.js';
import { useAccount } from '../../../features/account/hooks/use-account.js';
import { limitSetsQuery } from '../../../features/limits/api/list-limit-sets.js';
import { ArchiveProject } from '../../../features/projects/components/archive-project.js';
import { ProjectSettingsForm } from '../../../features/projects/components/project-settings-form.js';
import { useProject } from '../../../features/projects/hooks/use-project.js';
import { ReadingRules } from '../../../features/recordings/rules/reading-rules.js';
import { useProjectId } from '../../use-project-id.js';

export function Component() {
  const account = useAccount();
  const project = useProject(useProjectId());
  const mayChange = holds('project.update', project.role);
  return (
    <>
      <PageHeader title="Settings" documentTitle={`Settings, ${project.name}`} />
      {mayChange ? (
        <ProjectSettings project={project} />
      ) : (
        <Text color="inkSoft" mb="6">
          The project itself is changed by its managers, named under Members.
        </Text>
      )}
      <ReadingRules
        projectId={project.id}
        mayWrite={holds('reading-rule.write', project.role, account.isAdministrator)}
      />
      {mayChange ? <ArchiveProject project={project} /> : null}
    </>
  );
}

function ProjectSettings({ project }: { project: Project }) {
  const limitSets = useQuery(limitSetsQuery(project.id));
  if (limitSets.isPending) return <LoadingState label="Loading the settings" />;
  if (limitSets.isError) {
    return <ErrorState error={limitSets.error} onRetry={() => void limitSets.refetch()} />;
  }
  return <ProjectSettingsForm project={project} limitSets={limitSets.data} />;
}
