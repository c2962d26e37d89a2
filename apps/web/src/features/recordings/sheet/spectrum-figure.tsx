import { Text, useBreakpointValue } from '@chakra-ui/react';
import type { ChannelAnalysis, LimitSet, Recording } from '@overtally/contracts';
import { useMemo, useState } from 'react';
import { FigureFrame } from '../../../components/figure-frame.js';
import { Plot, type PlotPointEvent } from '../../../components/plot.js';
import { Segmented } from '../../../components/segmented.js';
import { TableTwin } from '../../../components/table-twin.js';
import type { Scale } from '../../../components/charts/amplitude-axis.js';
import { usePalette } from '../../../lib/theme/use-palette.js';
import type { LetteredNote } from '../charts/note-letters.js';
import { orderChart } from '../charts/order-chart.js';
import type { ChannelComparison, OrderRow } from '../charts/order-rows.js';
import { fundamentalSymbol, channelTitle } from '../charts/words.js';
import { FrequencyView } from './frequency-view.js';
import type { NoteTarget } from './note-target.js';
import { orderColumns } from './order-columns.js';

interface SpectrumFigureProps {
  recording: Recording;
  analysisId: string;
  channel: ChannelAnalysis;
  /** Drawn as the ceiling; null: none. */
  set: LimitSet | null;
  comparison: ChannelComparison;
  notes: readonly LetteredNote[];
  target: NoteTarget | null;
  onTarget: (target: NoteTarget) => void;
}

type Abscissa = 'order' | 'frequency';
const height = 280;

/** Figure 2: orders as bars under the limit, or the spectrum line by line; a click selects what a note speaks of. */
export function SpectrumFigure(props: SpectrumFigureProps) {
  const { channel, comparison, target, onTarget } = props;
  const { rows } = comparison;
  const [chosen, setAbscissa] = useState<Abscissa>('order');
  const [scale, setScale] = useState<Scale>('log');
  const [relative, setRelative] = useState(false);
  const abscissa = rows.length > 0 ? chosen : 'frequency';
  const title = `${channelTitle(channel)} by ${abscissa}`;
  const symbol = fundamentalSymbol(channel.quantity);
  const columns = useMemo(() => orderColumns(rows, channel.unit, symbol), [rows, channel.unit, symbol]);
  const selectedOrder = target?.kind === 'order' ? target.order : null;
  return (
    <FigureFrame
      title={title}
      subtitle={abscissa === 'order' ? orderWords(channel) : undefined}
      toggles={
        <>
          {rows.length > 0 ? (
            <Segmented
              label="Spectrum drawn by"
              value={abscissa}
              options={[
                { value: 'order', label: 'Order' },
                { value: 'frequency', label: 'Frequency' },
              ]}
              onChange={setAbscissa}
            />
          ) : null}
          <Segmented label="Scale" value={scale} options={scales} onChange={setScale} />
          {rows.length > 0 ? (
            <Segmented
              label="Amplitudes"
              value={relative ? 'relative' : 'absolute'}
              options={[
                { value: 'absolute', label: channel.unit || 'Absolute' },
                { value: 'relative', label: `% of ${symbol}` },
              ]}
              onChange={(value) => setRelative(value === 'relative')}
            />
          ) : null}
        </>
      }
      table={
        rows.length === 0 ? undefined : (
          <TableTwin
            caption={title}
            columns={columns}
            rows={rows}
            rowKey={(row) => row.order}
            fileName={`${props.recording.number}-orders`}
            isSelected={(row) => row.order === selectedOrder}
            onSelect={(row) => onTarget({ kind: 'order', order: row.order })}
            maxHeight="560px"
          />
        )
      }
    >
      {abscissa === 'order' ? (
        <>
          <OrderView {...props} scale={scale} relative={relative} title={title} />
          {props.set ? <LimitSource set={props.set} rows={rows} /> : null}
        </>
      ) : (
        <FrequencyView {...props} scale={scale} relative={relative} title={title} height={height} />
      )}
    </FigureFrame>
  );
}

function LimitSource({ set: { title, edition }, rows }: { set: LimitSet; rows: readonly OrderRow[] }) {
  const spared = rows.filter((row) => row.result === 'disregarded' && (row.sharePercent ?? 0) > 100).length;
  return (
    <Text fontSize="xs" color="inkSoft">
      Limits: {[title, edition].filter(Boolean).join(', ')}. Check them against the current edition.
      {spared > 0
        ? ` Grey bars over the line, ${spared} of them, are too small to be judged; see the table.`
        : ''}
    </Text>
  );
}

const scales = [
  { value: 'log', label: 'Log' },
  { value: 'linear', label: 'Linear' },
] as const;

function orderWords({ windows, quantity }: ChannelAnalysis): string {
  if (!windows) return 'single lines over the whole record';
  const groups = quantity === 'current' ? 'groups' : 'subgroups';
  const count = windows.count === 1 ? '1 window' : `${windows.count} windows`;
  return `${groups}, mean of ${count} of ${windows.cycles} cycles, rectangular`;
}

function OrderView({
  channel,
  comparison,
  notes,
  target,
  onTarget,
  scale,
  relative,
  title,
}: SpectrumFigureProps & { scale: Scale; relative: boolean; title: string }) {
  const palette = usePalette();
  const labelStep = useBreakpointValue({ base: 10, sm: 5, lg: 2 }, { ssr: false }) ?? 2;
  const selected = target?.kind === 'order' ? target.order : null;
  const chart = useMemo(() => {
    const input = { rows: comparison.rows, unit: channel.unit, scale, relative, notes, selected, labelStep };
    return orderChart({ ...input, heightPx: height }, palette);
  }, [comparison.rows, channel.unit, scale, relative, notes, selected, labelStep, palette]);
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
      {chart.belowAxis > 0 ? (
        <Text fontSize="xs" color="inkSoft">
          ▽ {chart.belowAxis === 1 ? '1 order lies' : `${chart.belowAxis} orders lie`} below the axis; the
          table has {chart.belowAxis === 1 ? 'it' : 'them'}.
        </Text>
      ) : null}
    </>
  );
}
