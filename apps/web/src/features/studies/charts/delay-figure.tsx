import { groupDelay } from '@overtally/dsp';
import { useDeferredValue } from 'react';
import { CurveChart } from '../../../components/charts/curve-chart.js';
import { FoldingFigure } from '../../../components/folding-figure.js';
import { TableTwin } from '../../../components/table-twin.js';
import { formatSi } from '../../../lib/format.js';
import { usePrediction } from '../study-store.js';
import { extent, frequencyAxis, linearAxis } from './axes.js';

/** Group delay over frequency. */
export function DelayFigure() {
  return (
    <FoldingFigure
      title="Group delay"
      subtitle="How much later a narrow band about each frequency comes out"
      table={<DelayTable />}
    >
      <DelayCurve />
    </FoldingFigure>
  );
}

function useDelays(): { frequencies: number[]; delays: (number | null)[] } | null {
  const prediction = useDeferredValue(usePrediction());
  if (prediction.kind !== 'steady') return null;
  const frequencies = prediction.steady.bode.points.map(({ frequencyHz }) => frequencyHz);
  return { frequencies, delays: groupDelay(prediction.facts.chain, frequencies) };
}

function DelayCurve() {
  const found = useDelays();
  if (!found) return null;
  const { frequencies, delays } = found;
  return (
    <CurveChart
      label="Group delay over frequency"
      height={190}
      x={frequencyAxis(frequencies[0]!, frequencies.at(-1)!)}
      y={linearAxis(extent(delays), 's')}
      curves={[{ x: frequencies, y: delays, tone: 'act' }]}
      readout={{
        x: frequencies,
        at: (i) => `${formatSi(frequencies[i], 'Hz')}: ${formatSi(delays[i], 's')}`,
      }}
    />
  );
}

function DelayTable() {
  const found = useDelays();
  if (!found) return null;
  return (
    <TableTwin
      caption="Group delay over frequency"
      columns={[
        {
          key: 'frequency',
          header: 'Frequency',
          fileHeader: 'Frequency (Hz)',
          align: 'right',
          value: (i: number) => found.frequencies[i]!,
          show: (i) => formatSi(found.frequencies[i], 'Hz'),
        },
        {
          key: 'delay',
          header: 'Group delay',
          fileHeader: 'Group delay (s)',
          align: 'right',
          value: (i: number) => found.delays[i] ?? null,
          show: (i) => formatSi(found.delays[i], 's'),
        },
      ]}
      rows={found.frequencies.map((_, i) => i)}
      rowKey={(i) => i}
      fileName="group-delay"
      maxHeight="320px"
    />
  );
}
