import { Button, Text } from '@chakra-ui/react';
import type { Project } from '@overtally/contracts';
import { useState } from 'react';
import { ConfirmDialog } from '../../../components/confirm-dialog.js';
import { notifyDone, notifyProblem } from '../../../components/notify.js';
import { Section } from '../../../components/section.js';
import { formatDate } from '../../../lib/format-date.js';
import { useUpdateProject } from '../hooks/use-update-project.js';

/** Puts a project away, or brings it back. */
export function ArchiveProject({ project }: { project: Project }) {
  const [asking, setAsking] = useState(false);
  const update = useUpdateProject(project.id);
  const setArchived = (archived: boolean) =>
    update.mutate(
      { archived },
      {
        onSuccess: () => {
          setAsking(false);
          notifyDone(archived ? 'Project archived' : 'Project brought back');
        },
        onError: (error) => notifyProblem(archived ? 'Not archived' : 'Not brought back', error),
      },
    );
  const archivedAt = project.archivedAt;
  return (
    <Section title="Archive">
      <Text mb="3" maxW="62ch">
        {archivedAt
          ? `Archived on ${formatDate(archivedAt)}. Everything in it can still be read.`
          : 'An archived project leaves the list of projects. Everything in it is kept, can be read, and can be brought back.'}
      </Text>
      {archivedAt ? (
        <Button loading={update.isPending} onClick={() => setArchived(false)}>
          Bring back
        </Button>
      ) : (
        <Button color="over" onClick={() => setAsking(true)}>
          Archive project
        </Button>
      )}
      <ConfirmDialog
        open={asking}
        onClose={() => setAsking(false)}
        title={`Archive ${project.name}?`}
        confirmLabel="Archive project"
        destructive
        pending={update.isPending}
        onConfirm={() => setArchived(true)}
      >
        It leaves the list for everyone. A manager can bring it back.
      </ConfirmDialog>
    </Section>
  );
}
