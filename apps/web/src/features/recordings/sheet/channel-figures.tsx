import { Box, Text } from '@chakra-ui/react';
import { holds, type ChannelAnalysis, type LimitSet, type Note } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { ErrorState } from '../../../components/error-state.js';
import { MarginItem, MarginRow } from '../../../components/margin-column.js';
import { notesQuery } from '../api/notes.js';
import { withLetters } from '../charts/note-letters.js';
import type { ChannelComparison } from '../charts/order-rows.js';
import type { AnalysedSheetProps } from './analysed-sheet.js';
import { BandsSection } from './bands-section.js';
import { FiguresSection } from './figures-section.js';
import { FlagItems, WarningItems } from './flags/flag-items.js';
import { flagsAt, type FlagPlace } from './flags/flag-words.js';
import { InterharmonicsSection } from './interharmonics-section.js';
import { LinesSection } from './lines/lines-section.js';
import { MainsCaution } from './mains-caution.js';
import { NoteItems } from './notes/note-items.js';
import { NoteWriter } from './notes/note-writer.js';
import { SelectionLine } from './selection-line.js';
import { SeriesFigure } from './series/series-figure.js';
import { SpectrumFigure } from './spectrum-figure.js';
import { StatisticsSection } from './statistics/statistics-section.js';
import { TimeFigure } from './time-figure.js';
import { figureIds, placeOfTarget, type NotePlace, type useSheetState } from './use-sheet-state.js';

interface ChannelFiguresProps extends AnalysedSheetProps {
  figures: ChannelAnalysis;
  state: ReturnType<typeof useSheetState>;
  /** Drawn as the ceiling; null: none. */
  set: LimitSet | null;
  comparison: ChannelComparison;
}

/** The figures of a channel, each with what the margin says of it. */
export function ChannelFigures(props: ChannelFiguresProps) {
  const { analysis, figures, recording, comparison, set, state, slots } = props;
  const notes = useNotes(props);
  const hasWindows = figures.windows !== null;
  const fromS = analysis.settings.span?.fromS ?? 0;
  const flags = (place: FlagPlace) => (
    <FlagItems flags={flagsAt(figures.flags, place, hasWindows)} fromS={fromS} onTime={state.showTime} />
  );
  return (
    <>
      <MarginRow
        label="Margin beside the waveform"
        title="Margin"
        margin={
          <>
            {flags('waveform')}
            <WarningItems
              warnings={recording.warnings}
              sampleRateHz={recording.sampleRateHz}
              onTime={state.showTime}
            />
            {notes.at('time')}
          </>
        }
      >
        <Box id={figureIds.time}>
          <TimeFigure
            recording={recording}
            channel={{ ...figures, gain: 1, offset: 0 }}
            figures={figures}
            notes={notes.onChannel}
            view={state.view}
            onView={state.setView}
            analysed={analysis.settings.span ?? null}
            markS={state.markS}
            {...(notes.mayWrite ? { onNote: state.noteOnView } : {})}
          />
        </Box>
      </MarginRow>
      <MarginRow
        label="Margin beside the spectrum"
        margin={
          <>
            {flags('spectrum')}
            {comparison.gap ? (
              <MarginItem tone="near" title="Not compared throughout" foot="from the limit set">
                <Text>{comparison.gap}</Text>
              </MarginItem>
            ) : null}
            {notes.problem}
            {notes.at('spectrum')}
          </>
        }
      >
        <Box id={figureIds.spectrum}>
          <SpectrumFigure
            recording={recording}
            analysisId={analysis.id}
            settings={analysis.settings}
            channel={figures}
            set={set}
            comparison={comparison}
            notes={notes.onChannel}
            target={state.target}
            onTarget={state.select}
            foot={
              state.target && state.target.kind !== 'span' ? (
                <SelectionLine
                  channel={figures}
                  rows={comparison.rows}
                  target={state.target}
                  onFollow={hasWindows && state.target.kind === 'order' ? state.followTarget : undefined}
                  onNote={notes.mayWrite ? () => state.write('spectrum') : undefined}
                  onClear={() => state.select(null)}
                />
              ) : null
            }
          />
        </Box>
      </MarginRow>
      {hasWindows ? (
        <MarginRow label="Margin beside the figure over time" margin={flags('windows')}>
          <Box id={figureIds.series}>
            <SeriesFigure
              recording={recording}
              analysisId={analysis.id}
              settings={analysis.settings}
              channel={figures}
              choice={state.series}
              onChoice={state.setSeries}
              onTime={state.showTime}
            />
          </Box>
        </MarginRow>
      ) : null}
      <MarginRow label="Cautions" margin={<MainsCaution />}>
        <FiguresSection recording={recording} channel={figures} settings={analysis.settings} />
        <StatisticsSection recording={recording} channel={figures} />
        <LinesSection
          recording={recording}
          channel={figures}
          target={state.target}
          onTarget={state.showLine}
        />
        <InterharmonicsSection recording={recording} channel={figures} onFollow={state.followInterharmonic} />
        <BandsSection recording={recording} channel={figures} />
        {slots.verdicts?.(analysis)}
      </MarginRow>
    </>
  );
}

/** Notes of the analysis, lettered, and their pieces for each place of the margin. */
function useNotes(props: ChannelFiguresProps) {
  const { analysis, figures, comparison, state, project, account } = props;
  const notes = useQuery(notesQuery(analysis.id));
  const lettered = useMemo(() => withLetters(notes.data ?? []), [notes.data]);
  const onChannel = useMemo(
    () => lettered.filter(({ note }) => note.channel === figures.index),
    [lettered, figures.index],
  );
  const mayWrite = holds('note.write', project.role, account.isAdministrator);
  const mayChange = (note: Note) => mayWrite && (note.author.id === account.id || project.role === 'manager');
  const writer = (place: NotePlace) => (
    <NoteWriter
      analysisId={analysis.id}
      channel={figures.index}
      orders={comparison.rows.map((row) => row.order)}
      target={state.target}
      view={state.view}
      writing={state.writingAt === place}
      onWriting={(writing) => state.write(writing ? place : null)}
    />
  );
  const at = (place: NotePlace) => (
    <>
      <NoteItems
        analysisId={analysis.id}
        channel={figures}
        channelNames={new Map(analysis.channels.map(({ index, name }) => [index, name]))}
        rows={comparison.rows}
        notes={lettered.filter(({ note }) => placeOfTarget(note.target) === place)}
        onShow={state.showNote}
        mayChange={mayChange}
      />
      {mayWrite && (state.writingAt === place || (place === 'spectrum' && state.writingAt === null))
        ? writer(place)
        : null}
    </>
  );
  const problem = notes.isError ? (
    <ErrorState error={notes.error} onRetry={() => void notes.refetch()} />
  ) : null;
  return { onChannel, mayWrite, at, problem };
}
