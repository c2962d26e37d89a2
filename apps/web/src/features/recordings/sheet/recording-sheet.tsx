import { Button } from '@chakra-ui/react';
import {
  holds,
  type Account,
  type Analysis,
  type Channel,
  type LimitSet,
  type Project,
  type Recording,
} from '@overtally/contracts';
import { useState, type ReactNode } from 'react';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { PageHeader } from '../../../components/page-header.js';
import { notifyDone, notifyProblem } from '../../../components/notify.js';
import { useRecordingChanges } from '../hooks/use-recording-changes.js';
import { ImportDialog } from '../import/import-dialog.js';
import { isBusy, isCancelled } from '../recording-status.js';
import { AnalysedSheet } from './analysed-sheet.js';
import { FailNotice, RunNotice } from './run-notice.js';
import { SheetMenu } from './sheet-menu.js';
import { SheetTitleBlock } from './sheet-title-block.js';
import { StandingNotice } from './standing-notice.js';
import { ProvenanceSection } from './provenance-section.js';
import { ReadingSection } from './reading-section.js';
import { UnanalysedSheet } from './unanalysed-sheet.js';
import { useShownAnalysis } from './use-shown-analysis.js';

export type SheetPart = 'channel' | 'power';

/** What the address says of the sheet, and how to change it. */
export interface SheetPlace {
  analysisId: string | null;
  channel: number | null;
  /** The figures of a channel, or the power of the channels together. */
  part: SheetPart;
  onAnalysis: (analysisId: string | null) => void;
  /** Shows the figures of a channel, whatever part was shown. */
  onChannel: (channel: number) => void;
  onPart: (part: SheetPart) => void;
}

/** What other features put onto the sheet. */
export interface SheetSlots {
  /** Buttons beside the title. */
  actions?: (shown: { analysis: Analysis | null; channel: number }) => ReactNode;
  /** Verdicts on the analysis, under its figures. */
  verdicts?: (analysis: Analysis) => ReactNode;
}

export interface RecordingSheetProps {
  project: Project;
  account: Account;
  recording: Recording;
  limitSets: readonly LimitSet[];
  place: SheetPlace;
  slots: SheetSlots;
  onDeleted: () => void;
}

/** The sheet of one recording: what it is, what was computed from it, and what was noted in its margin. */
export function RecordingSheet(props: RecordingSheetProps) {
  const { project, account, recording, place, slots } = props;
  const [reading, setReading] = useState(false);
  const { read } = useRecordingChanges(recording);
  const onReadAgain = () => setReading(true);
  const { list, shownId, shown, running } = useShownAnalysis(recording, place.analysisId);
  const analysis = shown.data?.status === 'done' ? shown.data : null;
  const channels = analysis?.channels ?? recording.channels;
  const channel = chosenChannel(props, channels);
  const may = {
    update: holds('recording.update', project.role, account.isAdministrator),
    delete: holds('recording.delete', project.role, account.isAdministrator),
    run: holds('analysis.run', project.role, account.isAdministrator),
  };
  const readAgain = may.update ? (
    <Button onClick={onReadAgain}>Read again with other settings</Button>
  ) : undefined;
  return (
    <>
      <PageHeader
        title={recording.name}
        crumb={recording.number}
        documentTitle={`${recording.number} ${recording.name}, ${project.name}`}
        subtitle={subtitle(recording)}
        actions={
          <>
            {slots.actions?.({ analysis, channel })}
            <SheetMenu {...props} channel={channel} may={may} onReadAgain={onReadAgain} />
          </>
        }
      />
      <Progress
        {...props}
        runningId={may.run ? (running?.id ?? null) : null}
        mayCancelReading={may.update}
        readAgain={readAgain}
      />
      {shownId !== null && shown.isPending ? <LoadingState label="Loading the analysis" lines={8} /> : null}
      {shown.isError ? <ErrorState error={shown.error} onRetry={() => void shown.refetch()} /> : null}
      {shown.data ? (
        <StandingNotice
          analysis={shown.data}
          latestId={recording.latestAnalysisId}
          onLatest={() => place.onAnalysis(null)}
        />
      ) : null}
      {analysis ? (
        <AnalysedSheet key={analysis.id} {...props} analysis={analysis} channel={channel} mayRun={may.run} />
      ) : null}
      {shownId === null ? <UnanalysedSheet {...props} channel={channel} mayRun={may.run} /> : null}
      {shownId !== null && !analysis && !shown.isPending ? (
        <SheetTitleBlock recording={recording} channel={null} set={null} comparison={null} />
      ) : null}
      <ImportDialog
        open={reading}
        projectId={project.id}
        source={{ kind: 'recording', recording }}
        pending={read.isPending}
        onClose={() => setReading(false)}
        onRead={(options, readingRuleId) =>
          read.mutate(
            { ...options, readingRuleId },
            {
              onSuccess: () => {
                setReading(false);
                place.onAnalysis(null);
                notifyDone(`${recording.number} is read again`);
              },
              onError: (error) => notifyProblem('It is not read again', error),
            },
          )
        }
      />
      <ReadingSection recording={recording} />
      <ProvenanceSection
        analyses={list}
        shownId={shownId}
        latestId={recording.latestAnalysisId}
        onShow={(id) => place.onAnalysis(id === recording.latestAnalysisId ? null : id)}
      />
    </>
  );
}

/** The channel of the address, else the first that the project's limits are for, else the first. */
function chosenChannel(
  { project, limitSets, place }: RecordingSheetProps,
  channels: readonly Pick<Channel, 'index' | 'quantity'>[],
): number {
  const set = limitSets.find(({ id }) => id === project.comparisonLimitSetId);
  const channel =
    channels.find(({ index }) => index === place.channel) ??
    channels.find(({ quantity }) => quantity === set?.quantity) ??
    channels[0];
  return channel?.index ?? 0;
}

function subtitle({ channels, format, file, remark }: Recording): string {
  const names = channels.slice(0, 4).map(({ name }) => name);
  const more = channels.length > 4 ? ` and ${channels.length - 4} more channels` : '';
  return [names.join(', ') + more, [file.name, format?.toUpperCase()].filter(Boolean).join(', '), remark]
    .filter(Boolean)
    .join(' · ');
}

function Progress({
  recording,
  runningId,
  mayCancelReading,
  readAgain,
}: RecordingSheetProps & { runningId: string | null; mayCancelReading: boolean; readAgain: ReactNode }) {
  if (isBusy(recording) && recording.status !== 'ready' && recording.status !== 'failed') {
    return (
      <RunNotice
        recording={recording}
        status={recording.status}
        progress={recording.progress}
        analysisId={runningId}
        mayCancelReading={mayCancelReading}
      />
    );
  }
  if (recording.status !== 'failed' || !recording.problem) return null;
  const read = recording.channels.length > 0;
  const cancelled = isCancelled(recording.problem);
  const title = read
    ? cancelled
      ? 'Not analysed'
      : 'The analysis failed'
    : cancelled
      ? 'Reading was cancelled'
      : 'This file was not read';
  const actions = cancelled && read ? undefined : readAgain;
  return <FailNotice title={title} problem={recording.problem} actions={actions} />;
}
