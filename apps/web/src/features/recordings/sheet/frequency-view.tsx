import { Box, Button, Flex, Text } from '@chakra-ui/react';
import type { ChannelAnalysis, Spectrum } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { Plot, type PlotPointEvent, type PlotRelayoutEvent } from '../../../components/plot.js';
import { RangeFields } from '../../../components/range-fields.js';
import { Segmented } from '../../../components/segmented.js';
import type { Scale } from '../../../components/charts/amplitude-axis.js';
import { formatSi } from '../../../lib/format.js';
import { usePalette } from '../../../lib/theme/use-palette.js';
import { spectrumQuery } from '../api/get-spectrum.js';
import {
  frequencyChart,
  orderRange,
  rangeOfRelayout,
  strongestNear,
  wholeRange,
  type FrequencyRange,
} from '../charts/frequency-chart.js';
import type { LetteredNote } from '../charts/note-letters.js';
import type { ChannelComparison } from '../charts/order-rows.js';
import { FrequencyTable } from './frequency-table.js';
import { FamilyLegend } from './family-legend.js';
import type { NoteTarget } from './note-target.js';

/** How the spectrum is looked at; kept while the figure shows something else. */
export interface FrequencyLook {
  /** Null: up to the last order. */
  range: FrequencyRange | null;
  marks: 'orders' | 'lines';
}

interface FrequencyViewProps {
  analysisId: string;
  channel: ChannelAnalysis;
  comparison: ChannelComparison;
  notes: readonly LetteredNote[];
  target: NoteTarget | null;
  onTarget: (target: NoteTarget) => void;
  scale: Scale;
  amplitude: 'absolute' | 'relative' | 'density';
  look: FrequencyLook;
  onLook: (look: FrequencyLook) => void;
  title: string;
  height: number;
  /** Shows the numbers instead of the chart. */
  asTable?: { fileName: string };
}

/** The spectrum line by line; fetched when it is first looked at. */
export function FrequencyView(props: FrequencyViewProps) {
  const scaling = props.amplitude === 'density' ? 'density' : 'spectrum';
  const spectrum = useQuery(spectrumQuery(props.analysisId, props.channel.index, scaling));
  if (spectrum.isPending) {
    return (
      <Box h={`${props.height}px`}>
        <LoadingState label="Loading the spectrum" />
      </Box>
    );
  }
  if (spectrum.isError) return <ErrorState error={spectrum.error} onRetry={() => void spectrum.refetch()} />;
  if (!props.asTable) return <Lines {...props} spectrum={spectrum.data} />;
  const range = props.look.range ?? orderRange(spectrum.data, props.comparison.rows);
  return (
    <FrequencyTable
      spectrum={spectrum.data}
      range={range}
      caption={props.title}
      fileName={props.asTable.fileName}
    />
  );
}

function Lines(props: FrequencyViewProps & { spectrum: Spectrum }) {
  const { spectrum, channel, comparison, notes, target, onTarget, look, onLook } = props;
  const { scale, amplitude, title, height } = props;
  const palette = usePalette();
  const { rows } = comparison;
  const { lines, families } = channel;
  const range = useMemo(() => look.range ?? orderRange(spectrum, rows), [look.range, spectrum, rows]);
  const selectedHz = target?.kind === 'line' ? target.frequencyHz : null;
  const marks = rows.length === 0 ? 'lines' : look.marks;
  const chart = useMemo(() => {
    const what = { spectrum, rows, lines, families, notes };
    const how = { marks, scale, relative: amplitude === 'relative', range, selectedHz, heightPx: height };
    return frequencyChart({ ...what, ...how }, palette);
  }, [spectrum, rows, lines, families, notes, marks, scale, amplitude, range, selectedHz, height, palette]);
  const select = ({ points }: PlotPointEvent) => {
    const point = points[0];
    if (!point) return;
    if (typeof point.customdata === 'number') return onTarget({ kind: 'order', order: point.customdata });
    const reachHz = 2 * (spectrum.frequencyHz[1] ?? 0);
    const frequencyHz = spectrum.frequencyHz[strongestNear(spectrum, point.x / chart.factor, reachHz)];
    if (frequencyHz !== undefined) onTarget({ kind: 'line', frequencyHz });
  };
  const zoom = (event: PlotRelayoutEvent) => {
    const wanted = rangeOfRelayout(event, chart.factor);
    if (wanted === 'whole') onLook({ ...look, range: null });
    else if (wanted) onLook({ ...look, range: wanted });
  };
  return (
    <>
      <Plot
        label={`${title}, ${spectrum.frequencyHz.length} lines`}
        height={height}
        traces={chart.traces}
        layout={chart.layout}
        onClick={select}
        onRelayout={zoom}
      />
      {marks === 'lines' && amplitude !== 'density' ? (
        <FamilyLegend lines={lines} families={families} />
      ) : null}
      <Flex justify="space-between" align="center" wrap="wrap" columnGap="6" rowGap="2" mt="1">
        <RangeFields
          label="Frequencies shown"
          unit="Hz"
          range={{ from: range.fromHz, to: range.toHz }}
          limits={{ from: 0, to: wholeRange(spectrum).toHz }}
          onChange={({ from, to }) => onLook({ ...look, range: { fromHz: from, toHz: to } })}
          presets={
            <>
              {rows.length > 0 ? (
                <Preset label="To the last order" onClick={() => onLook({ ...look, range: null })} />
              ) : null}
              <Preset label="All" onClick={() => onLook({ ...look, range: wholeRange(spectrum) })} />
            </>
          }
        />
        {rows.length > 0 && lines.length > 0 && amplitude !== 'density' ? (
          <Segmented
            label="Marked in the spectrum"
            value={look.marks}
            options={[
              { value: 'orders', label: 'Orders marked' },
              { value: 'lines', label: 'Largest lines' },
            ]}
            onChange={(value) => onLook({ ...look, marks: value })}
          />
        ) : null}
      </Flex>
      <Text fontSize="xs" color="inkSoft" mt="1">
        {spectrumWords(spectrum)} Drag in the chart to zoom, double-click to go back.
      </Text>
    </>
  );
}

function Preset({ label, onClick }: { label: string; onClick: () => void }) {
  return (
    <Button size="2xs" variant="ghost" onClick={onClick}>
      {label}
    </Button>
  );
}

function spectrumWords({ window, resolutionHz, noiseBandwidthHz, segments }: Spectrum): string {
  const hertz = (value: number) => formatSi(value, 'Hz', { digits: 3 });
  const words = [`${window} window`];
  if (segments !== null && segments > 1) words.push(`${segments} segments averaged`);
  words.push(`lines ${hertz(resolutionHz)} apart`);
  if (noiseBandwidthHz !== null) words.push(`noise bandwidth ${hertz(noiseBandwidthHz)}`);
  return `${words.join(', ')}.`;
}
