import { Button } from '@chakra-ui/react';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { EmptyState } from '../../components/empty-state.js';
import { ErrorState } from '../../components/error-state.js';
import { LoadingState } from '../../components/loading-state.js';
import { PageHeader } from '../../components/page-header.js';
import { useAccount } from '../../features/account/hooks/use-account.js';
import { instrumentsQuery } from '../../features/instruments/api/list-instruments.js';
import { InstrumentDialog } from '../../features/instruments/components/instrument-dialog.js';
import { InstrumentFilterBar } from '../../features/instruments/components/instrument-filter.js';
import { InstrumentTable } from '../../features/instruments/components/instrument-table.js';
import { LaboratoryOnly } from '../../features/instruments/components/laboratory-only.js';
import { filtered, type InstrumentFilter } from '../../features/instruments/instrument-filter.js';
import { paths } from '../paths.js';

const noFilter: InstrumentFilter = { q: '', state: '', retired: false };

export function Component() {
  const account = useAccount();
  const navigate = useNavigate();
  const instruments = useQuery({ ...instrumentsQuery(), enabled: account.worksInLaboratory });
  const [filter, setFilter] = useState(noFilter);
  const [creating, setCreating] = useState(false);
  const [now] = useState(() => new Date());
  if (!account.worksInLaboratory) return <LaboratoryOnly title="Instruments" />;
  const shown = filtered(instruments.data ?? [], filter, now);
  const overdue = filtered(instruments.data ?? [], { ...noFilter, state: 'overdue' }, now).length;
  const create = (
    <Button variant="solid" onClick={() => setCreating(true)}>
      New instrument
    </Button>
  );
  const isEmpty = instruments.data?.length === 0;
  return (
    <>
      <PageHeader
        title="Instruments"
        subtitle={
          overdue > 0
            ? `Shared by all projects of the laboratory. Calibration is overdue for ${overdue} of them.`
            : 'Shared by all projects of the laboratory, with how their calibration stands today.'
        }
        actions={isEmpty ? undefined : create}
      />
      {instruments.isPending ? <LoadingState label="Loading the instruments" /> : null}
      {instruments.isError ? (
        <ErrorState error={instruments.error} onRetry={() => void instruments.refetch()} />
      ) : null}
      {isEmpty ? (
        <EmptyState title="No instrument yet" actions={create}>
          Enter transducers, recorders and sources with their calibrations, then put them together to
          measuring chains.
        </EmptyState>
      ) : null}
      {instruments.data && !isEmpty ? (
        <>
          <InstrumentFilterBar filter={filter} onChange={setFilter} />
          {shown.length > 0 ? (
            <InstrumentTable instruments={shown} instrumentTo={paths.instrument} now={now} />
          ) : (
            <EmptyState
              title="No instrument matches"
              actions={<Button onClick={() => setFilter({ ...noFilter, retired: true })}>Show all</Button>}
            >
              Names, manufacturers, models and numbers are searched.
            </EmptyState>
          )}
        </>
      ) : null}
      <InstrumentDialog
        instrument={null}
        account={account}
        open={creating}
        onClose={() => setCreating(false)}
        onSaved={({ id }) => void navigate(paths.instrument(id))}
      />
    </>
  );
}
