import { holds } from '@overtally/contracts';
import { Outlet, type LoaderFunctionArgs } from 'react-router-dom';
import { AppShell } from '../../components/app-shell.js';
import { useAccount } from '../../features/account/hooks/use-account.js';
import { projectQuery } from '../../features/projects/api/get-project.js';
import { useProject } from '../../features/projects/hooks/use-project.js';
import { queryClient } from '../../lib/query-client.js';
import { paths } from '../paths.js';
import { useProjectId } from '../use-project-id.js';
import { Tools } from './tools.js';

export async function loader({ params }: LoaderFunctionArgs): Promise<null> {
  await queryClient.ensureQueryData(projectQuery(params.projectId ?? ''));
  return null;
}

/** Frame of the pages of one project. */
export function Component() {
  const account = useAccount();
  const project = useProject(useProjectId());
  const { id } = project;
  const tabs = [
    { label: 'Recordings', to: paths.recordings(id) },
    { label: 'Equipment', to: paths.equipment(id) },
    { label: 'Overlay', to: paths.overlay(id) },
    { label: 'Limits', to: paths.limits(id) },
    { label: 'Studies', to: paths.studies(id) },
    { label: 'Reports', to: paths.reports(id) },
    { label: 'Members', to: paths.members(id) },
    ...(holds('reading-rule.read', project.role, account.isAdministrator)
      ? [{ label: 'Settings', to: paths.projectSettings(id), atFoot: true }]
      : []),
  ];
  return (
    <AppShell
      homeTo={paths.projects()}
      place={{ label: project.name, to: paths.project(id) }}
      tabs={tabs}
      tabsLabel="Project"
      tools={<Tools account={account} />}
    >
      <Outlet />
    </AppShell>
  );
}

export { ErrorBoundary } from './general.js';
