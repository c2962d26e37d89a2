import { useQuery } from '@tanstack/react-query';
import { EmptyState } from '../../components/empty-state.js';
import { ErrorState } from '../../components/error-state.js';
import { LoadingState } from '../../components/loading-state.js';
import { PageHeader } from '../../components/page-header.js';
import { useAccount } from '../../features/account/hooks/use-account.js';
import { laboratoryQuery } from '../../features/laboratory/api/laboratory.js';
import { LaboratoryForm } from '../../features/laboratory/components/laboratory-form.js';

export function Component() {
  const account = useAccount();
  const laboratory = useQuery(laboratoryQuery());
  return (
    <>
      <PageHeader
        title="Laboratory"
        subtitle="Named on the title page of every report that is issued from now on."
      />
      {!account.isAdministrator ? (
        <EmptyState title="Only administrators name the laboratory">
          Ask an administrator of this installation.
        </EmptyState>
      ) : null}
      {laboratory.isPending ? <LoadingState label="Loading the laboratory" /> : null}
      {laboratory.isError ? (
        <ErrorState error={laboratory.error} onRetry={() => void laboratory.refetch()} />
      ) : null}
      {laboratory.data && account.isAdministrator ? <LaboratoryForm laboratory={laboratory.data} /> : null}
    </>
  );
}
