import { Button } from '@chakra-ui/react';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { EmptyState } from '../../../components/empty-state.js';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { Section } from '../../../components/section.js';
import { accessKeysQuery } from '../api/list-access-keys.js';
import { AccessKeyTable } from './access-key-table.js';
import { CreateAccessKeyDialog } from './create-access-key-dialog.js';

/** Keys with which one's own scripts use the API. */
export function AccessKeys() {
  const keys = useQuery(accessKeysQuery());
  const [creating, setCreating] = useState(false);
  return (
    <Section
      title="Access keys"
      lead="A script that sends one may do what you may do."
      actions={<Button onClick={() => setCreating(true)}>New access key</Button>}
    >
      {keys.isPending ? <LoadingState label="Loading the access keys" /> : null}
      {keys.isError ? <ErrorState error={keys.error} onRetry={() => void keys.refetch()} /> : null}
      {keys.data?.length === 0 ? (
        <EmptyState title="No access keys">
          Make one to upload captures or read results from a script.
        </EmptyState>
      ) : null}
      {keys.data && keys.data.length > 0 ? <AccessKeyTable keys={keys.data} /> : null}
      <CreateAccessKeyDialog open={creating} onClose={() => setCreating(false)} />
    </Section>
  );
}
