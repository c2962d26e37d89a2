import { Box, Button, Text, useBreakpointValue } from '@chakra-ui/react';
import type { Channel, ChannelAnalysis, Recording } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { ErrorState } from '../../../components/error-state.js';
import { FigureFrame } from '../../../components/figure-frame.js';
import { LoadingState } from '../../../components/loading-state.js';
import { Plot, type PlotRelayoutEvent } from '../../../components/plot.js';
import { formatCount, formatDuration, formatFixed, formatSi } from '../../../lib/format.js';
import { usePalette } from '../../../lib/theme/use-palette.js';
import { waveformQuery } from '../api/get-waveform.js';
import type { LetteredNote } from '../charts/note-letters.js';
import { OverviewStrip } from '../charts/overview-strip.js';
import { clampSpan, type Span } from '../charts/span.js';
import { spanOfRelayout, waveformChart } from '../charts/waveform-chart.js';
import { channelTitle } from '../charts/words.js';
import { useSettled } from './use-settled.js';
import { WaveformTable } from './waveform-table.js';

interface TimeFigureProps {
  recording: Recording;
  channel: Channel;
  /** Figures of the channel; null before it was analysed. */
  figures: ChannelAnalysis | null;
  /** Notes on the channel; those on time spans are marked. */
  notes?: readonly LetteredNote[];
  /** Part of the record that was analysed; null: all of it, or nothing yet. */
  analysed?: Span | null;
  /** A moment that is pointed at. */
  markS?: number | null;
  view: Span;
  onView: (view: Span) => void;
  /** Begins a note on the part in view; absent for those who may not write. */
  onNote?: () => void;
}

const noNotes: readonly LetteredNote[] = [];
const height = 190;
const samplesAtLeast = 16;
const settleMs = 120;

/** Figure 1: the whole record as a strip, and the part in view as it was sampled. */
export function TimeFigure(props: TimeFigureProps) {
  const { recording, channel, figures, notes = noNotes, view, onView, onNote } = props;
  const { analysed = null, markS = null } = props;
  const palette = usePalette();
  const labels = useBreakpointValue({ base: 4, md: 9 }, { ssr: false }) ?? 9;
  const durationS = recording.durationS ?? 0;
  const leastS = Math.min(durationS, samplesAtLeast / (recording.sampleRateHz ?? 1));
  const settled = useSettled(view, settleMs);
  const overview = useQuery(waveformQuery(recording, { channel: channel.index, points: 1200 }));
  const part = useQuery(waveformQuery(recording, { channel: channel.index, ...settled, points: 2400 }));
  const chart = useMemo(
    () =>
      part.data ? waveformChart({ waveform: part.data, span: view, notes, labels, markS }, palette) : null,
    [part.data, view, notes, labels, markS, palette],
  );
  const zoom = (event: PlotRelayoutEvent) => {
    const wanted = spanOfRelayout(event, view);
    if (wanted === 'whole') onView({ fromS: 0, toS: durationS });
    else if (wanted) onView(clampSpan(wanted, durationS, leastS));
  };
  const title = `${channelTitle(channel)} against time`;
  return (
    <FigureFrame
      title={title}
      subtitle={subtitle(view, durationS, figures, analysed)}
      figures={timeFigures(channel, figures)}
      toggles={
        onNote ? (
          <Button size="xs" variant="ghost" onClick={onNote}>
            Note on this part
          </Button>
        ) : undefined
      }
      table={part.data ? <WaveformTable waveform={part.data} recording={recording} /> : undefined}
    >
      <OverviewStrip
        waveform={overview.data ?? null}
        durationS={durationS}
        leastS={leastS}
        view={view}
        onView={onView}
        analysed={analysed}
      />
      {part.isError ? <ErrorState error={part.error} onRetry={() => void part.refetch()} /> : null}
      {part.isPending ? (
        <Box h={`${height}px`}>
          <LoadingState label="Loading the waveform" />
        </Box>
      ) : null}
      {chart ? (
        <Plot
          label={`${title}, ${formatDuration(view.toS - view.fromS)} from ${formatDuration(view.fromS)}`}
          height={height}
          traces={chart.traces}
          layout={chart.layout}
          onRelayout={zoom}
        />
      ) : null}
      {part.data?.kind === 'envelope' ? (
        <Text fontSize="xs" color="inkSoft">
          Drawn from the lowest to the highest sample of each {formatDuration(part.data.stepS)}; narrow the
          part in view to see single samples.
        </Text>
      ) : null}
    </FigureFrame>
  );
}

function subtitle(
  view: Span,
  durationS: number,
  figures: ChannelAnalysis | null,
  analysed: Span | null,
): string {
  const shown = viewWords(view, durationS, figures?.fundamental?.frequencyHz ?? null);
  if (!analysed) return shown;
  return `${shown}; analysed from ${formatDuration(analysed.fromS)} to ${formatDuration(analysed.toS)}`;
}

function viewWords(view: Span, durationS: number, fundamentalHz: number | null): string {
  const length = view.toS - view.fromS;
  if (!fundamentalHz) return `${formatDuration(length)} of ${formatDuration(durationS)}`;
  const cycles = (seconds: number) => {
    const count = seconds * fundamentalHz;
    return count < 9.95 ? String(Number(count.toFixed(1))) : formatCount(count);
  };
  return `${cycles(length)} cycles of ${cycles(durationS)}`;
}

function timeFigures({ unit }: Channel, figures: ChannelAnalysis | null) {
  if (!figures) return [];
  return [
    { label: 'rms', value: formatSi(figures.rms, unit) },
    { label: 'crest factor', value: formatFixed(figures.crestFactor, 2) },
  ];
}
