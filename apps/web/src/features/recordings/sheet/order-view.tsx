import { Text, useBreakpointValue } from '@chakra-ui/react';
import type { ChannelAnalysis, LimitSet } from '@overtally/contracts';
import { useMemo } from 'react';
import { Plot, type PlotPointEvent } from '../../../components/plot.js';
import type { Scale } from '../../../components/charts/amplitude-axis.js';
import { usePalette } from '../../../lib/theme/use-palette.js';
import type { LetteredNote } from '../charts/note-letters.js';
import { orderChart } from '../charts/order-chart.js';
import type { ChannelComparison, OrderRow } from '../charts/order-rows.js';
import type { NoteTarget } from './note-target.js';

interface OrderViewProps {
  channel: ChannelAnalysis;
  /** Drawn as the ceiling; null: none. */
  set: LimitSet | null;
  comparison: ChannelComparison;
  notes: readonly LetteredNote[];
  target: NoteTarget | null;
  onTarget: (target: NoteTarget) => void;
  scale: Scale;
  relative: boolean;
  title: string;
  height: number;
}

/** The orders as bars under the limit. */
export function OrderView(props: OrderViewProps) {
  const { channel, set, comparison, notes, target, onTarget, scale, relative, title, height } = props;
  const palette = usePalette();
  const labelStep = useBreakpointValue({ base: 10, sm: 5, lg: 2 }, { ssr: false }) ?? 2;
  const selected = target?.kind === 'order' ? target.order : null;
  const { rows } = comparison;
  const chart = useMemo(() => {
    const input = { rows, unit: channel.unit, scale, relative, notes, selected, labelStep };
    return orderChart({ ...input, heightPx: height }, palette);
  }, [rows, channel.unit, scale, relative, notes, selected, labelStep, height, palette]);
  const select = ({ points }: PlotPointEvent) => {
    const order = points[0] && Math.round(points[0].x);
    if (order) onTarget({ kind: 'order', order });
  };
  return (
    <>
      <Plot
        label={`${title}: ${comparison.words}`}
        height={height}
        traces={chart.traces}
        layout={chart.layout}
        onClick={select}
      />
      <Text fontSize="xs" color="inkSoft">
        {[belowWords(chart.belowAxis), set ? limitWords(set, rows) : ''].filter(Boolean).join(' ')}
      </Text>
    </>
  );
}

function belowWords(count: number): string {
  if (count === 0) return '';
  return count === 1
    ? '▽ 1 order lies below the axis; the table has it.'
    : `▽ ${count} orders lie below the axis; the table has them.`;
}

function limitWords({ title, edition }: LimitSet, rows: readonly OrderRow[]): string {
  const spared = rows.filter((row) => row.result === 'disregarded' && (row.sharePercent ?? 0) > 100).length;
  const source = `Limits: ${[title, edition].filter(Boolean).join(', ')}. Check them against the current edition.`;
  if (spared === 0) return source;
  return `${source} Grey bars over the line, ${spared} of them, are too small to be judged; see the table.`;
}
