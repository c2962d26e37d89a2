import { Button } from '@chakra-ui/react';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { EmptyState } from '../../components/empty-state.js';
import { ErrorState } from '../../components/error-state.js';
import { LoadingState } from '../../components/loading-state.js';
import { PageHeader } from '../../components/page-header.js';
import { useAccount } from '../../features/account/hooks/use-account.js';
import { usersQuery } from '../../features/people/api/list-users.js';
import { CreateUserDialog } from '../../features/people/components/create-user-dialog.js';
import { UserTable } from '../../features/people/components/user-table.js';

export function Component() {
  const account = useAccount();
  if (account.isAdministrator) return <People ownId={account.id} />;
  return (
    <>
      <PageHeader title="People" />
      <EmptyState title="Only administrators manage accounts">
        Ask an administrator of this installation.
      </EmptyState>
    </>
  );
}

function People({ ownId }: { ownId: string }) {
  const users = useQuery(usersQuery());
  const [creating, setCreating] = useState(false);
  return (
    <>
      <PageHeader
        title="People"
        subtitle="Accounts of this installation. Who works on a project stands on its members page."
        actions={
          <Button variant="solid" onClick={() => setCreating(true)}>
            New account
          </Button>
        }
      />
      {users.isPending ? <LoadingState label="Loading the accounts" /> : null}
      {users.isError ? <ErrorState error={users.error} onRetry={() => void users.refetch()} /> : null}
      {users.isSuccess ? <UserTable users={users.data} ownId={ownId} /> : null}
      <CreateUserDialog open={creating} onClose={() => setCreating(false)} />
    </>
  );
}
