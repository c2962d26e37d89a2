import { Box } from '@chakra-ui/react';
import { lazy, Suspense } from 'react';
import { usePalette } from '../lib/theme/use-palette.js';
import { LoadingState } from './loading-state.js';
import { plotConfig, plotLayout, type PlotLayout } from './plot-layout.js';

const LazyPlot = lazy(() => import('./plotly-plot.js'));

/** What a pointer event of the chart tells, as far as it is used here. */
export interface PlotPointEvent {
  points: readonly { x: number; y: number; curveNumber: number; pointIndex: number; customdata?: unknown }[];
}

/** Changed axis ranges after zooming: `xaxis.range[0]`, `xaxis.autorange` and their like. */
export type PlotRelayoutEvent = Record<string, unknown>;

/** One trace in Plotly's own form. */
export type PlotTrace = Record<string, unknown> & { type: string };

interface PlotProps {
  /** What the chart shows, for screen readers; its table twin carries the numbers. */
  label: string;
  traces: readonly PlotTrace[];
  /** Laid over the themed layout. */
  layout?: PlotLayout;
  /** In px. */
  height: number;
  onClick?: (event: PlotPointEvent) => void;
  onHover?: (event: PlotPointEvent) => void;
  onRelayout?: (event: PlotRelayoutEvent) => void;
}

/** A chart in our look. The charting code is fetched when the first chart is shown. */
export function Plot({ label, traces, layout, height, onClick, onHover, onRelayout }: PlotProps) {
  const palette = usePalette();
  return (
    <Box role="figure" aria-label={label} h={`${height}px`} w="full" overflow="hidden">
      <Suspense
        fallback={<LoadingState label={`Loading the chart: ${label}`} lines={Math.floor(height / 44)} />}
      >
        <LazyPlot
          data={[...traces]}
          layout={plotLayout(palette, layout)}
          config={plotConfig}
          useResizeHandler
          style={{ width: '100%', height: '100%' }}
          onClick={onClick}
          onHover={onHover}
          onRelayout={onRelayout}
        />
      </Suspense>
    </Box>
  );
}
