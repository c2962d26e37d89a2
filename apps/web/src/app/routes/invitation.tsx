import { Stack, Text } from '@chakra-ui/react';
import type { AcceptedInvitation, OfferedInvitation } from '@overtally/contracts';
import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useLocation, useNavigate } from 'react-router-dom';
import { ErrorState } from '../../components/error-state.js';
import { LoadingState } from '../../components/loading-state.js';
import { accountQuery } from '../../features/account/api/get-account.js';
import { SignInForm } from '../../features/auth/components/sign-in-form.js';
import { offeredInvitationQuery } from '../../features/invitations/api/look-at-invitation.js';
import { AcceptButton } from '../../features/invitations/components/accept-button.js';
import { NewcomerForm } from '../../features/invitations/components/newcomer-form.js';
import { formatDateTime } from '../../lib/format-date.js';
import { BarePage } from '../layouts/bare-page.js';
import { paths } from '../paths.js';

export function Component() {
  const token = useLocation().hash.slice(1);
  const offered = useQuery({ ...offeredInvitationQuery(token), enabled: token !== '' });
  if (token === '') {
    return (
      <BarePage title="Invitation">
        <Text role="alert">The link is not complete. Open it as it stands in the message.</Text>
      </BarePage>
    );
  }
  return (
    <BarePage title={offered.data ? `Join ${offered.data.projectName}` : 'Invitation'}>
      {offered.isPending ? <LoadingState label="Looking at the invitation" /> : null}
      {offered.isError ? (
        <ErrorState
          title="This link does not work"
          error={offered.error}
          onRetry={() => void offered.refetch()}
        />
      ) : null}
      {offered.data ? <Offer token={token} offer={offered.data} /> : null}
    </BarePage>
  );
}

function Offer({ token, offer }: { token: string; offer: OfferedInvitation }) {
  const navigate = useNavigate();
  const queryClient = useQueryClient();
  const account = useQuery({ ...accountQuery(), enabled: offer.hasAccount, retry: false });
  const accepted = ({ projectId }: AcceptedInvitation) => {
    queryClient.clear();
    void navigate(paths.project(projectId), { replace: true });
  };
  const { email, role, invitedBy, expiresAt, hasAccount } = offer;
  const shared = { token, email, onAccepted: accepted };
  return (
    <Stack gap="4">
      <Text>
        {invitedBy} invites you as {role}. The invitation ends on {formatDateTime(expiresAt)}.
      </Text>
      {hasAccount ? null : <NewcomerForm {...shared} />}
      {hasAccount && account.isPending ? <LoadingState label="Looking whether you are signed in" /> : null}
      {hasAccount && account.data?.email === email ? <AcceptButton {...shared} /> : null}
      {hasAccount && !account.isPending && account.data?.email !== email ? (
        <>
          <Text>{email} has an account. Sign in with it to accept.</Text>
          <SignInForm onSignedIn={(own) => queryClient.setQueryData(accountQuery().queryKey, own)} />
        </>
      ) : null}
    </Stack>
  );
}
