import { Button } from '@chakra-ui/react';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { useNavigate, useParams } from 'react-router-dom';
import { CalibrationMark } from '../../components/calibration-mark.js';
import { ConfirmDialog } from '../../components/confirm-dialog.js';
import { EmptyState } from '../../components/empty-state.js';
import { ErrorState } from '../../components/error-state.js';
import { LoadingState } from '../../components/loading-state.js';
import { notifyDone, notifyProblem } from '../../components/notify.js';
import { PageHeader } from '../../components/page-header.js';
import { Section } from '../../components/section.js';
import { TitleBlock } from '../../components/title-block.js';
import { useAccount } from '../../features/account/hooks/use-account.js';
import { instrumentQuery } from '../../features/instruments/api/get-instrument.js';
import { calibrationsQuery } from '../../features/instruments/api/list-calibrations.js';
import { CalibrationDialog } from '../../features/instruments/components/calibration-dialog.js';
import { CalibrationTable } from '../../features/instruments/components/calibration-table.js';
import { InstrumentDialog } from '../../features/instruments/components/instrument-dialog.js';
import { useLaboratoryChanges } from '../../features/instruments/hooks/use-laboratory-changes.js';
import { dueWords, kindWords } from '../../features/instruments/instrument-words.js';
import { standingOf } from '../../lib/calibration-words.js';
import { none } from '../../lib/format.js';
import { paths } from '../paths.js';

export function Component() {
  const { instrumentId = '' } = useParams();
  const account = useAccount();
  const navigate = useNavigate();
  const found = useQuery(instrumentQuery(instrumentId));
  const calibrations = useQuery(calibrationsQuery(instrumentId));
  const [asked, setAsked] = useState<'edit' | 'calibrate' | 'delete' | null>(null);
  const [now] = useState(() => new Date());
  const { changeInstrument, removeInstrument } = useLaboratoryChanges();
  const close = () => setAsked(null);
  if (found.isPending) return <LoadingState label="Loading the instrument" />;
  if (found.isError) return <ErrorState error={found.error} onRetry={() => void found.refetch()} />;
  const instrument = found.data;
  const { id, name, manufacturer, model, serialNumber, retiredAt } = instrument;
  const retire = () =>
    changeInstrument.mutate(
      { id, change: { retired: retiredAt === null } },
      {
        onSuccess: () => notifyDone(retiredAt ? `${name} is in use again` : `${name} retired`),
        onError: (error) => notifyProblem(`${name} not changed`, error),
      },
    );
  const add = (
    <Button variant="solid" onClick={() => setAsked('calibrate')}>
      New calibration
    </Button>
  );
  return (
    <>
      <PageHeader
        title={retiredAt ? `${name} (retired)` : name}
        subtitle={kindWords[instrument.kind]}
        crumb={name}
        documentTitle={name}
        actions={
          <>
            <Button onClick={() => setAsked('edit')}>Edit</Button>
            <Button onClick={retire} loading={changeInstrument.isPending}>
              {retiredAt ? 'Use again' : 'Retire'}
            </Button>
            <Button onClick={() => setAsked('delete')}>Delete</Button>
          </>
        }
      />
      <TitleBlock
        label={`Title block of ${name}`}
        cells={[
          {
            caption: 'Calibration today',
            value: (
              <>
                <CalibrationMark standing={standingOf(instrument, now)} /> {dueWords(instrument)}
              </>
            ),
            grow: 2.4,
          },
          {
            caption: 'Manufacturer and model',
            value: [manufacturer, model].join(' ').trim() || none,
            grow: 1.6,
          },
          { caption: 'Serial number', value: serialNumber, mono: true, grow: 1 },
          { caption: 'Looked after by', value: instrument.responsible?.name ?? 'Administrators', grow: 1.2 },
          ...(instrument.remark ? [{ caption: 'Remark', value: instrument.remark, grow: 2 }] : []),
        ]}
      />
      <Section title="Calibrations" actions={add} mt="6">
        {calibrations.isPending ? <LoadingState label="Loading the calibrations" /> : null}
        {calibrations.isError ? (
          <ErrorState error={calibrations.error} onRetry={() => void calibrations.refetch()} />
        ) : null}
        {calibrations.data?.length === 0 ? (
          <EmptyState title="No calibration yet">
            Enter the calibration with the days on its certificate. Recordings made since then show it, and
            reports name it.
          </EmptyState>
        ) : null}
        {calibrations.data && calibrations.data.length > 0 ? (
          <CalibrationTable
            calibrations={calibrations.data}
            countingId={instrument.calibration?.id ?? null}
          />
        ) : null}
      </Section>
      <InstrumentDialog instrument={instrument} account={account} open={asked === 'edit'} onClose={close} />
      <CalibrationDialog instrumentId={id} open={asked === 'calibrate'} onClose={close} />
      <ConfirmDialog
        open={asked === 'delete'}
        onClose={close}
        title={`Delete ${name}?`}
        confirmLabel="Delete"
        destructive
        pending={removeInstrument.isPending}
        onConfirm={() =>
          removeInstrument.mutate(id, {
            onSuccess: () => {
              notifyDone(`${name} deleted`);
              void navigate(paths.instruments());
            },
            onError: (error) => notifyProblem(`${name} not deleted`, error),
            onSettled: close,
          })
        }
      >
        Its calibrations and certificates go with it. This cannot be taken back. One that stands in a
        measuring chain or an issued report stays; retire it instead.
      </ConfirmDialog>
    </>
  );
}
