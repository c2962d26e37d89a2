import { useQuery } from '@tanstack/react-query';
import { EmptyState } from '../../../components/empty-state.js';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { Section } from '../../../components/section.js';
import { invitationsQuery } from '../api/list-invitations.js';
import { InvitationTable } from './invitation-table.js';

/** Invitations to a project, for those who manage its members. */
export function Invitations({ projectId }: { projectId: string }) {
  const invitations = useQuery(invitationsQuery(projectId));
  return (
    <Section title="Invitations" mt="10">
      {invitations.isPending ? <LoadingState label="Loading the invitations" /> : null}
      {invitations.isError ? (
        <ErrorState error={invitations.error} onRetry={() => void invitations.refetch()} />
      ) : null}
      {invitations.data?.length === 0 ? (
        <EmptyState title="Nobody is invited">
          Who has no account yet is invited by e-mail when you add the address above.
        </EmptyState>
      ) : null}
      {invitations.data && invitations.data.length > 0 ? (
        <InvitationTable projectId={projectId} invitations={invitations.data} />
      ) : null}
    </Section>
  );
}
