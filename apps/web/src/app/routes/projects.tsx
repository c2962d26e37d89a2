import { Button, Input } from '@chakra-ui/react';
import type { Project } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { EmptyState } from '../../components/empty-state.js';
import { ErrorState } from '../../components/error-state.js';
import { LoadingState } from '../../components/loading-state.js';
import { PageHeader } from '../../components/page-header.js';
import { projectsQuery } from '../../features/projects/api/list-projects.js';
import { CreateProjectDialog } from '../../features/projects/components/create-project-dialog.js';
import { ProjectTable } from '../../features/projects/components/project-table.js';
import { paths } from '../paths.js';

export function Component() {
  const navigate = useNavigate();
  const projects = useQuery(projectsQuery());
  const [creating, setCreating] = useState(false);
  const [search, setSearch] = useState('');
  const begin = (
    <Button variant="solid" onClick={() => setCreating(true)}>
      New project
    </Button>
  );
  const isFilled = projects.isSuccess && projects.data.length > 0;
  return (
    <>
      <PageHeader
        title="Projects"
        subtitle={projects.isSuccess ? summary(projects.data) : undefined}
        actions={
          isFilled ? (
            <>
              <Input
                type="search"
                aria-label="Search projects"
                placeholder="Search name, customer"
                width="56"
                value={search}
                onChange={(event) => setSearch(event.target.value)}
              />
              {begin}
            </>
          ) : null
        }
      />
      {projects.isPending ? <LoadingState label="Loading the projects" /> : null}
      {projects.isError ? (
        <ErrorState error={projects.error} onRetry={() => void projects.refetch()} />
      ) : null}
      {isFilled ? <Found projects={projects.data} search={search} onClear={() => setSearch('')} /> : null}
      {projects.isSuccess && !isFilled ? (
        <EmptyState title="No project yet" actions={begin}>
          A project holds the recordings, limits and reports of one job for one customer or product. Begin
          one, or ask a manager to add you to theirs.
        </EmptyState>
      ) : null}
      <CreateProjectDialog
        open={creating}
        onClose={() => setCreating(false)}
        onCreated={(project) => void navigate(paths.project(project.id))}
      />
    </>
  );
}

interface FoundProps {
  projects: readonly Project[];
  search: string;
  onClear: () => void;
}

function Found({ projects, search, onClear }: FoundProps) {
  const wanted = search.trim().toLocaleLowerCase();
  const found = projects.filter((project) =>
    `${project.name} ${project.customer}`.toLocaleLowerCase().includes(wanted),
  );
  if (found.length > 0) return <ProjectTable projects={found} projectTo={paths.project} />;
  return (
    <EmptyState
      title={`Nothing matches “${search.trim()}”`}
      actions={<Button onClick={onClear}>Show all</Button>}
    >
      Names and customers are searched.
    </EmptyState>
  );
}

function summary(projects: readonly Project[]): string | undefined {
  if (projects.length === 0) return undefined;
  const archived = projects.filter((project) => project.archivedAt !== null).length;
  const count = projects.length === 1 ? '1 project' : `${projects.length} projects`;
  return archived > 0 ? `${count}, ${archived} archived` : count;
}
