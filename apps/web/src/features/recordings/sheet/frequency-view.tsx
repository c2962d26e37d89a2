import { Box, Flex, Text } from '@chakra-ui/react';
import type { Spectrum } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { Plot, type PlotPointEvent } from '../../../components/plot.js';
import { Segmented } from '../../../components/segmented.js';
import type { Scale } from '../../../components/charts/amplitude-axis.js';
import { formatSi } from '../../../lib/format.js';
import { usePalette } from '../../../lib/theme/use-palette.js';
import { spectrumQuery } from '../api/get-spectrum.js';
import { frequencyChart, strongestNear } from '../charts/frequency-chart.js';
import type { LetteredNote } from '../charts/note-letters.js';
import type { ChannelComparison } from '../charts/order-rows.js';
import type { NoteTarget } from './note-target.js';

interface FrequencyViewProps {
  analysisId: string;
  channel: { index: number };
  comparison: ChannelComparison;
  notes: readonly LetteredNote[];
  target: NoteTarget | null;
  onTarget: (target: NoteTarget) => void;
  scale: Scale;
  relative: boolean;
  title: string;
  height: number;
}

/** The spectrum line by line; fetched when it is first looked at. */
export function FrequencyView(props: FrequencyViewProps) {
  const spectrum = useQuery(spectrumQuery(props.analysisId, props.channel.index));
  if (spectrum.isPending) {
    return (
      <Box h={`${props.height}px`}>
        <LoadingState label="Loading the spectrum" />
      </Box>
    );
  }
  if (spectrum.isError) return <ErrorState error={spectrum.error} onRetry={() => void spectrum.refetch()} />;
  return <Lines {...props} spectrum={spectrum.data} />;
}

type Extent = 'orders' | 'whole';

function Lines({
  spectrum,
  comparison,
  notes,
  target,
  onTarget,
  ...props
}: FrequencyViewProps & { spectrum: Spectrum }) {
  const { scale, relative, title, height } = props;
  const palette = usePalette();
  const [extent, setExtent] = useState<Extent>('orders');
  const selectedHz = target?.kind === 'line' ? target.frequencyHz : null;
  const { rows } = comparison;
  const whole = extent === 'whole' || rows.length === 0;
  const chart = useMemo(() => {
    const input = { spectrum, rows, scale, relative, whole, notes, selectedHz, heightPx: height };
    return frequencyChart(input, palette);
  }, [spectrum, rows, scale, relative, whole, notes, selectedHz, height, palette]);
  const select = ({ points }: PlotPointEvent) => {
    const point = points[0];
    if (!point) return;
    if (typeof point.customdata === 'number') return onTarget({ kind: 'order', order: point.customdata });
    const reachHz = 2 * (spectrum.frequencyHz[1] ?? 0);
    const frequencyHz = spectrum.frequencyHz[strongestNear(spectrum, point.x / chart.factor, reachHz)];
    if (frequencyHz !== undefined) onTarget({ kind: 'line', frequencyHz });
  };
  return (
    <>
      <Plot
        label={`${title}, ${spectrum.frequencyHz.length} lines`}
        height={height}
        traces={chart.traces}
        layout={chart.layout}
        onClick={select}
      />
      <Flex justify="space-between" align="baseline" wrap="wrap" gap="3">
        <Text fontSize="xs" color="inkSoft">
          {spectrum.window} window, lines {formatSi(spectrum.resolutionHz, 'Hz', { digits: 3 })} apart. Drag
          to zoom, double-click to go back.
        </Text>
        {rows.length > 0 ? (
          <Segmented
            label="Frequencies shown"
            value={extent}
            options={[
              { value: 'orders', label: 'Up to the last order' },
              { value: 'whole', label: 'All' },
            ]}
            onChange={setExtent}
          />
        ) : null}
      </Flex>
    </>
  );
}
