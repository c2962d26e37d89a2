import { Button } from '@chakra-ui/react';
import type { MeasuringChainListItem } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { ConfirmDialog } from '../../components/confirm-dialog.js';
import { EmptyState } from '../../components/empty-state.js';
import { ErrorState } from '../../components/error-state.js';
import { LoadingState } from '../../components/loading-state.js';
import { notifyDone, notifyProblem } from '../../components/notify.js';
import { PageHeader } from '../../components/page-header.js';
import { useAccount } from '../../features/account/hooks/use-account.js';
import { instrumentsQuery } from '../../features/instruments/api/list-instruments.js';
import { ChainDialog } from '../../features/instruments/components/chain-dialog.js';
import { ChainList } from '../../features/instruments/components/chain-list.js';
import { LaboratoryOnly } from '../../features/instruments/components/laboratory-only.js';
import { useLaboratoryChanges } from '../../features/instruments/hooks/use-laboratory-changes.js';
import { chainsQuery } from '../../lib/bench-queries.js';
import { paths } from '../paths.js';

type Asked = { chain: MeasuringChainListItem | null; act: 'write' | 'copy' | 'delete' };

export function Component() {
  const account = useAccount();
  const chains = useQuery({ ...chainsQuery(), enabled: account.worksInLaboratory });
  const instruments = useQuery({ ...instrumentsQuery(), enabled: account.worksInLaboratory });
  const [asked, setAsked] = useState<Asked | null>(null);
  const [now] = useState(() => new Date());
  const { removeChain } = useLaboratoryChanges();
  if (!account.worksInLaboratory) return <LaboratoryOnly title="Measuring chains" />;
  const close = () => setAsked(null);
  const hasInstruments = (instruments.data?.length ?? 0) > 0;
  const create = hasInstruments ? (
    <Button variant="solid" onClick={() => setAsked({ chain: null, act: 'write' })}>
      New chain
    </Button>
  ) : (
    <Button asChild>
      <Link to={paths.instruments()}>Enter instruments first</Link>
    </Button>
  );
  const isEmpty = chains.data?.length === 0;
  const doomed = asked?.act === 'delete' ? asked.chain : null;
  return (
    <>
      <PageHeader
        title="Measuring chains"
        subtitle="Which instruments stand between a quantity and its samples. A chain is as good as the worst of them."
        actions={isEmpty || !chains.data ? undefined : create}
      />
      {chains.isPending ? <LoadingState label="Loading the chains" /> : null}
      {chains.isError ? <ErrorState error={chains.error} onRetry={() => void chains.refetch()} /> : null}
      {isEmpty ? (
        <EmptyState title="No measuring chain yet" actions={create}>
          Put instruments together in their order; a recording then names its chain, and its calibration on
          the day of the capture shows on the sheet and in the report.
        </EmptyState>
      ) : null}
      {chains.data && !isEmpty ? (
        <ChainList
          chains={chains.data}
          instrumentTo={paths.instrument}
          now={now}
          onEdit={(chain, copies) => setAsked({ chain, act: copies ? 'copy' : 'write' })}
          onDelete={(chain) => setAsked({ chain, act: 'delete' })}
        />
      ) : null}
      <ChainDialog
        key={asked ? `${asked.act} ${asked.chain?.id ?? ''}` : 'closed'}
        chain={asked?.chain ?? null}
        copies={asked?.act === 'copy'}
        instruments={instruments.data ?? []}
        open={asked !== null && asked.act !== 'delete'}
        onClose={close}
      />
      <ConfirmDialog
        open={doomed !== null}
        onClose={close}
        title={`Delete ${doomed?.name ?? ''}?`}
        confirmLabel="Delete"
        destructive
        pending={removeChain.isPending}
        onConfirm={() =>
          removeChain.mutate(doomed!.id, {
            onSuccess: () => notifyDone(`${doomed!.name} deleted`),
            onError: (error) => notifyProblem(`${doomed!.name} not deleted`, error),
            onSettled: close,
          })
        }
      >
        Its instruments stay. This cannot be taken back.
      </ConfirmDialog>
    </>
  );
}
