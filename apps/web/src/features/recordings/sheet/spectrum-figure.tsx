import type { ChannelAnalysis, LimitSet, Recording, Settings } from '@overtally/contracts';
import { useMemo, useState, type ReactNode } from 'react';
import { FigureFrame } from '../../../components/figure-frame.js';
import { Segmented } from '../../../components/segmented.js';
import { TableTwin } from '../../../components/table-twin.js';
import type { Scale } from '../../../components/charts/amplitude-axis.js';
import { densityUnit } from '../charts/frequency-chart.js';
import type { LetteredNote } from '../charts/note-letters.js';
import type { ChannelComparison } from '../charts/order-rows.js';
import { fundamentalSymbol, channelTitle } from '../charts/words.js';
import { FrequencyView, type FrequencyLook } from './frequency-view.js';
import type { NoteTarget } from './note-target.js';
import { orderColumns } from './order-columns.js';
import { OrderView } from './order-view.js';
import { extentWords } from './settings/settings-words.js';

interface SpectrumFigureProps {
  recording: Recording;
  analysisId: string;
  settings: Settings;
  channel: ChannelAnalysis;
  /** Drawn as the ceiling; null: none. */
  set: LimitSet | null;
  comparison: ChannelComparison;
  notes: readonly LetteredNote[];
  target: NoteTarget | null;
  onTarget: (target: NoteTarget) => void;
  /** What stands under chart and table: the selection. */
  foot: ReactNode;
}

type Abscissa = 'order' | 'frequency';
type Amplitude = 'absolute' | 'relative' | 'density';
const height = 280;

/** Figure 2: orders as bars under the limit, or the spectrum line by line; a click selects what a note speaks of. */
export function SpectrumFigure(props: SpectrumFigureProps) {
  const { channel, comparison, settings, recording } = props;
  const { rows } = comparison;
  const [chosen, setAbscissa] = useState<Abscissa>('order');
  const [scale, setScale] = useState<Scale>('log');
  const [wanted, setAmplitude] = useState<Amplitude>('absolute');
  const [look, setLook] = useState<FrequencyLook>({ range: null, marks: 'orders' });
  const abscissa = rows.length > 0 ? chosen : 'frequency';
  const options = amplitudes(channel, rows.length > 0, abscissa);
  const amplitude = options.find(({ value }) => value === wanted)?.value ?? 'absolute';
  const title = `${channelTitle(channel)} by ${abscissa}`;
  const view = { ...props, scale, title, height };
  const frequency = { ...view, amplitude, look, onLook: setLook };
  return (
    <FigureFrame
      title={title}
      subtitle={abscissa === 'order' ? orderWords(channel, settings) : undefined}
      foot={props.foot}
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
          {options.length > 1 ? (
            <Segmented label="Amplitudes" value={amplitude} options={options} onChange={setAmplitude} />
          ) : null}
        </>
      }
      table={
        abscissa === 'order' ? (
          <OrderTable {...props} title={title} />
        ) : (
          <FrequencyView {...frequency} asTable={{ fileName: `${recording.number}-spectrum` }} />
        )
      }
    >
      {abscissa === 'order' ? (
        <OrderView {...view} relative={amplitude === 'relative'} />
      ) : (
        <FrequencyView {...frequency} />
      )}
    </FigureFrame>
  );
}

const scales = [
  { value: 'log', label: 'Log' },
  { value: 'linear', label: 'Linear' },
] as const;

/** In the unit of the channel, in percent of order 1 where there is one, as a density where there are lines. */
function amplitudes({ unit, quantity }: ChannelAnalysis, hasOrders: boolean, abscissa: Abscissa) {
  const options: { value: Amplitude; label: string }[] = [{ value: 'absolute', label: unit || 'Absolute' }];
  if (hasOrders) options.push({ value: 'relative', label: `% of ${fundamentalSymbol(quantity)}` });
  if (abscissa === 'frequency') options.push({ value: 'density', label: densityUnit(unit) });
  return options;
}

function OrderTable({
  recording,
  channel,
  comparison: { rows },
  target,
  onTarget,
  title,
}: SpectrumFigureProps & { title: string }) {
  const columns = useMemo(() => orderColumns(rows, channel), [rows, channel]);
  const selected = target?.kind === 'order' ? target.order : null;
  return (
    <TableTwin
      caption={title}
      columns={columns}
      rows={rows}
      rowKey={(row) => row.order}
      fileName={`${recording.number}-orders`}
      isSelected={(row) => row.order === selected}
      onSelect={(row) => onTarget({ kind: 'order', order: row.order })}
      maxHeight="560px"
    />
  );
}

function orderWords({ windows, quantity }: ChannelAnalysis, settings: Settings): string {
  if (!windows) return `single lines over ${extentWords(settings)}`;
  const groups = quantity === 'current' ? 'groups' : 'subgroups';
  const count = windows.count === 1 ? '1 window' : `${windows.count} windows`;
  return `${groups}, mean of ${count} of ${windows.cycles} cycles, rectangular`;
}
