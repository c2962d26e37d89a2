import { Box, Link, Table, Text } from '@chakra-ui/react';
import type { Project } from '@overtally/contracts';
import { Link as RouterLink } from 'react-router-dom';
import { Sheet } from '../../../components/sheet.js';
import { formatCount } from '../../../lib/format.js';
import { formatDate } from '../../../lib/format-date.js';

interface ProjectTableProps {
  projects: readonly Project[];
  projectTo: (projectId: string) => string;
}

const counts = [
  { key: 'recordings', label: 'Recordings' },
  { key: 'reports', label: 'Reports' },
  { key: 'members', label: 'Members' },
] as const;

/** Projects with what is in them. On narrow screens the counts stand under the name. */
export function ProjectTable({ projects, projectTo }: ProjectTableProps) {
  return (
    <Sheet overflowX="auto">
      <Table.Root>
        <Table.Caption srOnly>Projects</Table.Caption>
        <Table.Header>
          <Table.Row>
            <Table.ColumnHeader scope="col">Project</Table.ColumnHeader>
            <Table.ColumnHeader scope="col" hideBelow="md">
              Customer
            </Table.ColumnHeader>
            {counts.map((count) => (
              <Table.ColumnHeader key={count.key} scope="col" textAlign="end" hideBelow="md">
                {count.label}
              </Table.ColumnHeader>
            ))}
            <Table.ColumnHeader scope="col">Your role</Table.ColumnHeader>
            <Table.ColumnHeader scope="col" hideBelow="lg">
              Begun
            </Table.ColumnHeader>
          </Table.Row>
        </Table.Header>
        <Table.Body>
          {projects.map((project) => (
            <ProjectRow key={project.id} project={project} to={projectTo(project.id)} />
          ))}
        </Table.Body>
      </Table.Root>
    </Sheet>
  );
}

function ProjectRow({ project, to }: { project: Project; to: string }) {
  return (
    <Table.Row _hover={{ bg: 'wash' }} position="relative">
      <Table.Cell>
        <Link
          asChild
          fontWeight="600"
          color="ink"
          _after={{ content: '""', position: 'absolute', inset: '0' }}
          _hover={{ color: 'act' }}
        >
          <RouterLink to={to}>{project.name}</RouterLink>
        </Link>
        {project.archivedAt ? (
          <Box as="span" color="inkSoft" ml="2">
            archived
          </Box>
        ) : null}
        <Text hideFrom="md" color="inkSoft" fontSize="13px">
          {[project.customer, `${formatCount(project.counts.recordings)} recordings`]
            .filter(Boolean)
            .join(', ')}
        </Text>
      </Table.Cell>
      <Table.Cell hideBelow="md">{project.customer}</Table.Cell>
      {counts.map((count) => (
        <Table.Cell key={count.key} textAlign="end" fontFamily="mono" fontSize="13px" hideBelow="md">
          {formatCount(project.counts[count.key])}
        </Table.Cell>
      ))}
      <Table.Cell color="inkSoft">{project.role ?? 'administrator'}</Table.Cell>
      <Table.Cell color="inkSoft" hideBelow="lg" whiteSpace="nowrap">
        {formatDate(project.createdAt)}
      </Table.Cell>
    </Table.Row>
  );
}
