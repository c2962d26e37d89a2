import { Box, Button, Link, Text, useBreakpointValue } from '@chakra-ui/react';
import type { ChannelAnalysis, Recording, Series, Settings } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import { ErrorState } from '../../../../components/error-state.js';
import { FigureFrame } from '../../../../components/figure-frame.js';
import { LoadingState } from '../../../../components/loading-state.js';
import { Plot, type PlotPointEvent, type PlotRelayoutEvent } from '../../../../components/plot.js';
import { RangeFields } from '../../../../components/range-fields.js';
import { formatCount, formatDuration, formatSi } from '../../../../lib/format.js';
import { apiUrl } from '../../../../lib/http.js';
import { usePalette } from '../../../../lib/theme/use-palette.js';
import { seriesQuery } from '../../api/get-series.js';
import { seriesChart, wholeSeries } from '../../charts/series-chart.js';
import type { Span } from '../../charts/span.js';
import { countedSeries } from './counted-series.js';
import { choiceTitle, orderOptions, statisticsOf, type SeriesChoice } from './series-choice.js';
import { SeriesControls } from './series-controls.js';
import { SeriesTable } from './series-table.js';

interface SeriesFigureProps {
  recording: Recording;
  analysisId: string;
  settings: Settings;
  channel: ChannelAnalysis;
  choice: SeriesChoice;
  onChoice: (choice: SeriesChoice) => void;
  /** Shows a moment of the record in the waveform. */
  onTime: (timeS: number) => void;
}

const height = 200;

/** Figure 3: one figure of the channel from window to window, or over longer intervals. */
export function SeriesFigure(props: SeriesFigureProps) {
  const { recording, analysisId, settings, channel, choice, onChoice, onTime } = props;
  const { order, aggregation } = choice;
  const isCounted = choice.figure === 'counted';
  const figure = choice.figure === 'counted' ? 'frequency' : choice.figure;
  const wanted = { channel: channel.index, figure, order, aggregation };
  const fetched = useQuery({ ...seriesQuery(analysisId, wanted), enabled: !isCounted });
  const counted = useMemo(() => countedSeries(channel), [channel]);
  const series = isCounted ? counted : fetched.data;
  const title = `${channel.name}, ${choiceTitle(choice, channel)} over time`;
  const fromS = settings.span?.fromS ?? 0;
  const isEmpty = series !== undefined && !series.value.some((value) => value !== null);
  const table = series && !isEmpty && (
    <SeriesTable
      series={series}
      fromS={fromS}
      title={title}
      fileName={`${recording.number}-${channel.name}-${choiceTitle(choice, channel).replaceAll(/\W+/g, '-')}`}
    />
  );
  return (
    <FigureFrame
      title={title}
      subtitle={series ? intervalsWords(series, isCounted) : undefined}
      figures={statisticFigures(choice, channel)}
      table={table || undefined}
    >
      <SeriesControls channel={channel} choice={choice} onChoice={onChoice} />
      {!isCounted && fetched.isPending ? (
        <Box h={`${height}px`}>
          <LoadingState label="Loading the figure over time" />
        </Box>
      ) : null}
      {!isCounted && fetched.isError ? (
        <ErrorState error={fetched.error} onRetry={() => void fetched.refetch()} />
      ) : null}
      {series && isEmpty ? <Text color="inkSoft">{emptyWords(choice)}</Text> : null}
      {series && !isEmpty ? (
        <Steps key={title} series={series} title={title} fromS={fromS} onTime={onTime} />
      ) : null}
      {series && !isEmpty && !isCounted ? (
        <Link
          fontSize="xs"
          href={apiUrl(`/analyses/${analysisId}/series.csv`, { channel: channel.index, figure, aggregation })}
          download
        >
          {orderOptions(figure, channel).length > 0
            ? 'Download every interval of all orders (CSV)'
            : 'Download every interval (CSV)'}
        </Link>
      ) : null}
    </FigureFrame>
  );
}

interface StepsProps {
  series: Series;
  title: string;
  fromS: number;
  onTime: (timeS: number) => void;
}

function Steps({ series, title, fromS, onTime }: StepsProps) {
  const palette = usePalette();
  const labels = useBreakpointValue({ base: 4, md: 9 }, { ssr: false }) ?? 9;
  const [zoomed, setZoomed] = useState<Span | null>(null);
  const whole = useMemo(() => wholeSeries(series, fromS), [series, fromS]);
  const range = zoomed ?? whole;
  const chart = useMemo(
    () => seriesChart({ series, fromS, range, labels }, palette),
    [series, fromS, range, labels, palette],
  );
  const flagged = series.flagged.filter(Boolean).length;
  const zoom = (event: PlotRelayoutEvent) => {
    if (event['xaxis.autorange'] === true) setZoomed(null);
    const from = event['xaxis.range[0]'];
    const to = event['xaxis.range[1]'];
    if (typeof from !== 'number' || typeof to !== 'number') return;
    setZoomed({
      fromS: Math.max(whole.fromS, from / chart.factor),
      toS: Math.min(whole.toS, to / chart.factor),
    });
  };
  const select = ({ points }: PlotPointEvent) => {
    const point = points[0];
    if (point) onTime(point.x / chart.factor);
  };
  return (
    <>
      <Plot
        label={`${title}, ${series.value.length} values${flagged > 0 ? `, ${flagged} of them flagged` : ''}`}
        height={height}
        traces={chart.traces}
        layout={chart.layout}
        onClick={select}
        onRelayout={zoom}
      />
      <RangeFields
        label="Times shown"
        unit="s"
        range={{ from: range.fromS, to: range.toS }}
        limits={{ from: whole.fromS, to: whole.toS }}
        onChange={({ from, to }) => setZoomed({ fromS: from, toS: to })}
        presets={
          <Button size="2xs" variant="ghost" onClick={() => setZoomed(null)}>
            All
          </Button>
        }
      />
      <Text fontSize="xs" color="inkSoft" mt="1">
        {flagged > 0 ? `Hatched: ${flaggedWords(flagged)}. ` : ''}
        {series.thinned ? 'Thinned for drawing: each point is the largest value of its stretch. ' : ''}
        Select a point to see its place in the waveform.
      </Text>
    </>
  );
}

const flaggedWords = (count: number) =>
  `${count === 1 ? '1 interval' : `${formatCount(count)} intervals`} with a gap, a step or a clipped crest, left out of the statistics`;

function intervalsWords({ value, intervalS, aggregation, thinned }: Series, isCounted: boolean): string {
  const length = formatDuration(intervalS);
  if (isCounted) return `whole cycles counted over ${length}`;
  if (thinned)
    return aggregation === 'window' ? `windows of ${length}` : `intervals of ${length}, root mean square`;
  const count = formatCount(value.length);
  if (aggregation === 'window') return `${count} ${value.length === 1 ? 'window' : 'windows'} of ${length}`;
  return `${count} ${value.length === 1 ? 'interval' : 'intervals'} of ${length}, root mean square`;
}

function statisticFigures(choice: SeriesChoice, channel: ChannelAnalysis) {
  const statistics = statisticsOf(choice, channel);
  if (!statistics) return [];
  const isPercent = ['thd', 'thdg', 'thds', 'pwhd'].includes(choice.figure);
  const show = (value: number) => formatSi(value, isPercent ? '%' : channel.unit);
  return [
    { label: 'mean', value: show(statistics.mean) },
    { label: '95 %', value: show(statistics.p95) },
    { label: '99 %', value: show(statistics.p99) },
    { label: 'highest', value: show(statistics.max) },
  ];
}

function emptyWords({ aggregation }: SeriesChoice): string {
  if (aggregation === 'window') return 'The windows hold nothing of this figure.';
  const interval = aggregation === '3s' ? '3 s' : '10 min';
  return `The span is shorter than one interval of ${interval}. Choose a shorter interval.`;
}
