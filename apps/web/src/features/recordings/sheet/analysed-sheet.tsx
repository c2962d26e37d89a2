import { Box, Button, Text } from '@chakra-ui/react';
import { holds, type Analysis, type ChannelAnalysis, type Note } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import { ErrorState } from '../../../components/error-state.js';
import { MarginColumn, MarginItem, MarginLayout } from '../../../components/margin-column.js';
import { notesQuery } from '../api/notes.js';
import { withLetters } from '../charts/note-letters.js';
import { clampSpan, firstView, resized, type Span } from '../charts/span.js';
import { isBusy } from '../recording-status.js';
import { ChannelChooser } from './channel-chooser.js';
import { ComparisonChooser } from './comparison-chooser.js';
import { FiguresSection } from './figures-section.js';
import { FlagItems, WarningItems } from './flag-items.js';
import { InterharmonicsSection } from './interharmonics-section.js';
import { MainsCaution } from './mains-caution.js';
import type { NoteTarget } from './note-target.js';
import { NotesMargin } from './notes/notes-margin.js';
import type { RecordingSheetProps } from './recording-sheet.js';
import { AnalyseDialog } from './settings/analyse-dialog.js';
import { SheetTitleBlock } from './sheet-title-block.js';
import { SpectrumFigure } from './spectrum-figure.js';
import { TimeFigure } from './time-figure.js';
import { useComparison } from './use-comparison.js';

interface AnalysedSheetProps extends RecordingSheetProps {
  analysis: Analysis;
  channel: number;
  mayRun: boolean;
}

/** Title block, figures and margin of a finished analysis. */
export function AnalysedSheet(props: AnalysedSheetProps) {
  const channel = props.analysis.channels.find(({ index }) => index === props.channel);
  if (!channel) return <ErrorState error={new Error('This analysis has no channel.')} />;
  return <ChannelSheet {...props} figures={channel} />;
}

function ChannelSheet(props: AnalysedSheetProps & { figures: ChannelAnalysis }) {
  const { analysis, figures, recording, project, limitSets, place, slots, mayRun } = props;
  const { sets, set, comparison, choose } = useComparison(figures, project, limitSets);
  const [chosenView, setView] = useState<Span | null>(null);
  const [asking, setAsking] = useState(false);
  const [target, setTarget] = useState<NoteTarget | null>(null);
  const [marked, setMarked] = useState<NoteTarget | null>(null);
  const durationS = recording.durationS ?? 0;
  const view = chosenView ?? firstView(durationS, figures.fundamental?.frequencyHz ?? null);
  const notes = useQuery(notesQuery(analysis.id));
  const lettered = useMemo(() => withLetters(notes.data ?? []), [notes.data]);
  const onChannel = useMemo(
    () => lettered.filter(({ note }) => note.channel === figures.index),
    [lettered, figures.index],
  );
  const select = (wanted: NoteTarget | null) => {
    setTarget(wanted);
    setMarked(null);
  };
  const show = (note: Note) => {
    if (note.channel !== figures.index) place.onChannel(note.channel);
    if (note.target.kind === 'span') setView(clampSpan(resized(note.target, 1.5), durationS, 0));
    setTarget(null);
    setMarked(note.target);
    const figure = note.target.kind === 'span' ? 'figure-time' : 'figure-spectrum';
    document.getElementById(figure)?.scrollIntoView({ block: 'nearest' });
  };
  return (
    <>
      <SheetTitleBlock recording={recording} channel={figures} set={set} comparison={comparison} />
      <ChannelChooser
        channels={analysis.channels}
        value={figures.index}
        onChange={(index) => {
          place.onChannel(index);
          select(null);
        }}
        actions={
          <>
            <ComparisonChooser sets={sets} value={set?.id ?? ''} onChange={choose} />
            {mayRun ? (
              <Button disabled={isBusy(recording)} onClick={() => setAsking(true)}>
                Analyse again
              </Button>
            ) : null}
          </>
        }
      />
      <MarginLayout
        margin={
          <MarginColumn title="Margin">
            <FlagItems flags={figures.flags} />
            <WarningItems warnings={recording.warnings} />
            {comparison.gap ? (
              <MarginItem tone="near" title="Not compared throughout" foot="from the limit set">
                <Text>{comparison.gap}</Text>
              </MarginItem>
            ) : null}
            {notes.isError ? <ErrorState error={notes.error} onRetry={() => void notes.refetch()} /> : null}
            <NotesMargin
              analysisId={analysis.id}
              channel={figures}
              channelNames={new Map(analysis.channels.map(({ index, name }) => [index, name]))}
              rows={comparison.rows}
              notes={lettered}
              target={target}
              onTarget={select}
              onShow={show}
              view={view}
              {...noteRights(props)}
            />
            <MainsCaution />
          </MarginColumn>
        }
      >
        <Box id="figure-time">
          <TimeFigure
            recording={recording}
            channel={{ ...figures, gain: 1, offset: 0 }}
            figures={figures}
            notes={onChannel}
            view={view}
            onView={setView}
            {...(noteRights(props).mayWrite ? { onNote: () => select({ kind: 'span', ...view }) } : {})}
          />
        </Box>
        <Box id="figure-spectrum">
          <SpectrumFigure
            recording={recording}
            analysisId={analysis.id}
            settings={analysis.settings}
            channel={figures}
            set={set}
            comparison={comparison}
            notes={onChannel}
            target={target ?? marked}
            onTarget={select}
          />
        </Box>
        <FiguresSection recording={recording} channel={figures} settings={analysis.settings} />
        <InterharmonicsSection recording={recording} channel={figures} />
        {slots.verdicts?.(analysis)}
      </MarginLayout>
      <AnalyseDialog
        recording={recording}
        settings={analysis.settings}
        view={view}
        open={asking}
        onClose={() => setAsking(false)}
      />
    </>
  );
}

function noteRights({ project, account }: RecordingSheetProps) {
  const mayWrite = holds('note.write', project.role, account.isAdministrator);
  return {
    mayWrite,
    mayChange: (note: Note) => mayWrite && (note.author.id === account.id || project.role === 'manager'),
  };
}
