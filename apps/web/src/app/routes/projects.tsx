import { Button, Input } from '@chakra-ui/react';
import type { Project, ProjectQuery } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { useState, type ReactNode } from 'react';
import { useNavigate } from 'react-router-dom';
import { EmptyState } from '../../components/empty-state.js';
import { ErrorState } from '../../components/error-state.js';
import { LoadingState } from '../../components/loading-state.js';
import { PageHeader } from '../../components/page-header.js';
import { Segmented } from '../../components/segmented.js';
import { projectsQuery } from '../../features/projects/api/list-projects.js';
import { CreateProjectDialog } from '../../features/projects/components/create-project-dialog.js';
import { ProjectTable } from '../../features/projects/components/project-table.js';
import { paths } from '../paths.js';

type Archived = ProjectQuery['archived'];

const shownOptions: readonly { value: Archived; label: string }[] = [
  { value: 'false', label: 'Current' },
  { value: 'true', label: 'Archived' },
];

export function Component() {
  const navigate = useNavigate();
  const [archived, setArchived] = useState<Archived>('false');
  const [creating, setCreating] = useState(false);
  const [search, setSearch] = useState('');
  const projects = useQuery(projectsQuery(archived));
  const isFilled = projects.isSuccess && projects.data.length > 0;
  const begin = (
    <Button variant="solid" onClick={() => setCreating(true)}>
      New project
    </Button>
  );
  return (
    <>
      <PageHeader
        title="Projects"
        subtitle={projects.isSuccess ? countWords(projects.data.length, archived) : undefined}
        actions={
          <>
            <Segmented
              label="Projects shown"
              value={archived}
              options={shownOptions}
              onChange={setArchived}
            />
            {isFilled ? (
              <>
                <Input
                  type="search"
                  aria-label="Search projects"
                  placeholder="Search name, customer"
                  width="52"
                  value={search}
                  onChange={(event) => setSearch(event.target.value)}
                />
                {begin}
              </>
            ) : null}
          </>
        }
      />
      {projects.isPending ? <LoadingState label="Loading the projects" /> : null}
      {projects.isError ? (
        <ErrorState error={projects.error} onRetry={() => void projects.refetch()} />
      ) : null}
      {projects.isSuccess ? (
        <Found
          projects={projects.data}
          search={search.trim()}
          onClear={() => setSearch('')}
          empty={archived === 'true' ? <NoneArchived /> : <NoneYet begin={begin} />}
        />
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
  empty: ReactNode;
}

function Found({ projects, search, onClear, empty }: FoundProps) {
  if (projects.length === 0) return empty;
  const wanted = search.toLocaleLowerCase();
  const found = projects.filter((project) =>
    `${project.name} ${project.customer}`.toLocaleLowerCase().includes(wanted),
  );
  if (found.length > 0) return <ProjectTable projects={found} projectTo={paths.project} />;
  return (
    <EmptyState title={`Nothing matches “${search}”`} actions={<Button onClick={onClear}>Show all</Button>}>
      Names and customers are searched.
    </EmptyState>
  );
}

function NoneYet({ begin }: { begin: ReactNode }) {
  return (
    <EmptyState title="No project yet" actions={begin}>
      A project holds the recordings, limits and reports of one job for one customer or product. Begin one, or
      ask a manager to add you to theirs.
    </EmptyState>
  );
}

function NoneArchived() {
  return (
    <EmptyState title="No archived project">
      A manager archives a project under its settings when the job is done.
    </EmptyState>
  );
}

function countWords(count: number, archived: Archived): string | undefined {
  if (count === 0) return undefined;
  const kind = archived === 'true' ? 'archived' : 'current';
  return count === 1 ? `1 ${kind}` : `${count} ${kind}`;
}
