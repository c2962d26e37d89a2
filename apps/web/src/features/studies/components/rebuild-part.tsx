import { Box, Button, Flex, Text } from '@chakra-ui/react';
import { residualRmsByOrder, type FourierSeries } from '@overtally/dsp';
import { useDeferredValue, useMemo, useState } from 'react';
import { CurveChart } from '../../../components/charts/curve-chart.js';
import { linearTicks } from '../../../components/charts/si-ticks.js';
import { FoldingFigure } from '../../../components/folding-figure.js';
import { SelectInput } from '../../../components/form-field.js';
import { NumberInput } from '../../../components/number-input.js';
import { Segmented } from '../../../components/segmented.js';
import { TableTwin } from '../../../components/table-twin.js';
import { formatFixed, formatPercent, formatSi } from '../../../lib/format.js';
import { saveBytes, saveText } from '../../../lib/save-file.js';
import { extent, linearAxis } from '../charts/axes.js';
import { cycleCsv, cycleOf, harmonicsCsv, normalised } from '../exports/cycle.js';
import { wavFile } from '../exports/wav.js';
import { useDraftPart, usePrediction } from '../study-store.js';

type Side = 'before' | 'behind';
type Sequence = 'magnitude' | 'order';

const sides = [
  { value: 'behind', label: 'Behind' },
  { value: 'before', label: 'Before' },
] as const;
const sequences = [
  { value: 'magnitude', label: 'Largest first' },
  { value: 'order', label: 'Lowest first' },
] as const;
const pointChoices = [256, 1024, 4096, 16_384].map((count) => ({
  value: String(count),
  label: `${count} points a cycle`,
}));

/** Rebuilds the wave from some of its orders, and hands it out for waveform sources. */
export function RebuildPart() {
  const [side, setSide] = useState<Side>('behind');
  return (
    <FoldingFigure
      title="Rebuild from orders"
      subtitle="How many orders it takes; one cycle and the harmonics as files for waveform sources"
      toggles={<Segmented label="Which wave" value={side} options={sides} onChange={setSide} />}
      table={<ResidualTable side={side} />}
    >
      <Rebuild side={side} />
    </FoldingFigure>
  );
}

function useSeries(side: Side): { series: FourierSeries; unit: string } | null {
  const prediction = useDeferredValue(usePrediction());
  const input = useDraftPart((draft) => draft.series);
  const inputUnit = useDraftPart((draft) => draft.inputUnit);
  const outputUnit = useDraftPart((draft) => draft.outputUnit);
  if (prediction.kind !== 'steady') return null;
  return side === 'before'
    ? { series: input, unit: inputUnit }
    : { series: prediction.steady.result.series, unit: outputUnit };
}

function Rebuild({ side }: { side: Side }) {
  const found = useSeries(side);
  return found ? <RebuildForm {...found} side={side} /> : null;
}

function RebuildForm({ series, unit, side }: { series: FourierSeries; unit: string; side: Side }) {
  const [sequence, setSequence] = useState<Sequence>('magnitude');
  const [wanted, setWanted] = useState(10);
  const [points, setPoints] = useState(1024);
  const residual = useMemo(() => residualRmsByOrder(series), [series]);
  const steps = sequence === 'magnitude' ? residual.byMagnitude : residual.byOrder;
  const count = Math.min(wanted, steps.length - 1);
  const orders = new Set([
    0,
    ...(sequence === 'magnitude'
      ? residual.ordersByMagnitude.slice(0, count)
      : Array.from({ length: count }, (_, i) => i + 1)),
  ]);
  const percents = steps.map((rms) => (residual.acRms > 0 ? (100 * rms) / residual.acRms : 0));
  const drawn = cycleOf(series, orders, 600);
  const whole = cycleOf(series, new Set([0, ...series.components.map(({ order }) => order)]), 600);
  const last = percents.length - 1;
  return (
    <Box>
      <Flex gap="4" wrap="wrap" align="center" fontSize="13px" mb="2">
        <Segmented
          label="Sequence of the orders"
          value={sequence}
          options={sequences}
          onChange={setSequence}
        />
        <label>
          {sequence === 'magnitude' ? 'Number of orders ' : 'Up to order '}
          <NumberInput
            size="xs"
            width="16"
            value={count}
            min={0}
            max={last}
            onChange={(value) => setWanted(Math.round(value))}
          />
        </label>
        <Text>{`leaves ${formatPercent(percents[count], 2)} of the rms, ${formatSi(steps[count], unit)}`}</Text>
      </Flex>
      <CurveChart
        label="rms that is left over, by the number of orders"
        height={160}
        x={{ scale: 'linear', from: 0, to: Math.max(1, last), ticks: linearTicks(0, Math.max(1, last), '') }}
        y={{ scale: 'linear', from: 0, to: 105, ticks: linearTicks(0, 105, '%') }}
        curves={[{ x: percents.map((_, i) => i), y: percents, tone: 'ink' }]}
        marks={[{ x: count, y: percents[count]!, tone: 'act', shape: 'ring' }]}
        readout={{ x: percents.map((_, i) => i), at: (i) => `${i}: ${formatPercent(percents[i], 2)}` }}
      />
      <CurveChart
        label="One cycle: whole wave and the wave from the chosen orders"
        height={170}
        hasAxes
        x={linearAxis([0, 1 / series.frequencyHz], 's', 0)}
        y={linearAxis(extent(drawn.values, whole.values), unit)}
        curves={[
          { x: whole.timeS, y: whole.values, tone: 'ink-soft', dash: '5 3', width: 1.2 },
          { x: drawn.timeS, y: drawn.values, tone: 'act' },
        ]}
      />
      <Exports {...{ series, unit, side, orders, points, setPoints }} />
    </Box>
  );
}

interface ExportsProps {
  series: FourierSeries;
  unit: string;
  side: Side;
  orders: ReadonlySet<number>;
  points: number;
  setPoints: (points: number) => void;
}

function Exports({ series, unit, side, orders, points, setPoints }: ExportsProps) {
  const cycle = cycleOf(series, orders, points);
  const rate = Math.round(cycle.sampleRateHz);
  const name = side === 'before' ? 'wave-before' : 'wave-predicted';
  const scaling = `A sample of 1 is ${formatSi(cycle.fullScale, unit, { digits: 7, trim: true })}`;
  const wav = (encoding: 'float32' | 'int16') =>
    saveBytes(
      `${name}-${encoding}.wav`,
      wavFile(normalised(cycle), cycle.sampleRateHz, encoding, {
        title: side === 'before' ? 'One cycle of the input' : 'One cycle of a predicted output',
        comment: `${scaling}. ${points} points make one cycle of ${series.frequencyHz} Hz (exact rate ${cycle.sampleRateHz} Sa/s). Orders: ${[...orders].sort((a, b) => a - b).join(' ')}.`,
        software: 'Overtally',
      }),
      'audio/wav',
    );
  return (
    <Box mt="3">
      <Flex gap="2" wrap="wrap" align="center">
        <SelectInput
          aria-label="Points a cycle in the files"
          width="52"
          options={pointChoices}
          value={String(points)}
          onChange={(event) => setPoints(Number(event.target.value))}
        />
        <Button onClick={() => saveText(`${name}.csv`, cycleCsv(cycle, unit))}>Cycle as CSV</Button>
        <Button onClick={() => wav('float32')}>WAV, 32-bit float</Button>
        <Button onClick={() => wav('int16')}>WAV, 16 bit</Button>
        <Button onClick={() => saveText(`${name}-harmonics.csv`, harmonicsCsv(series, orders, unit))}>
          Harmonics as CSV
        </Button>
      </Flex>
      <Text fontSize="xs" color="inkSoft" mt="1">
        {`${rate} Sa/s in WAV files${Math.abs(rate - cycle.sampleRateHz) > 1e-6 ? `, rounded from ${formatFixed(cycle.sampleRateHz, 3)} Sa/s as the format asks` : ''}. ${scaling}. The CSV is in ${unit || 'plain numbers'}.`}
      </Text>
    </Box>
  );
}

function ResidualTable({ side }: { side: Side }) {
  const found = useSeries(side);
  if (!found) return null;
  const { acRms, byMagnitude, ordersByMagnitude } = residualRmsByOrder(found.series);
  const rows = byMagnitude.map((rms, count) => ({ count, rms, order: ordersByMagnitude[count - 1] ?? null }));
  return (
    <TableTwin
      caption="rms that is left over by the number of orders, the largest first"
      columns={[
        { key: 'count', header: 'Orders', fileHeader: 'Orders', align: 'right', value: (row) => row.count },
        {
          key: 'order',
          header: 'Last taken',
          fileHeader: 'Last taken',
          align: 'right',
          value: (row) => row.order,
        },
        {
          key: 'rms',
          header: 'Left over',
          fileHeader: found.unit ? `Left over, rms (${found.unit})` : 'Left over, rms',
          align: 'right',
          value: (row) => row.rms,
          show: (row) => formatSi(row.rms, found.unit),
        },
        {
          key: 'percent',
          header: 'Of the rms',
          fileHeader: 'Of the rms (%)',
          align: 'right',
          value: (row) => (acRms > 0 ? (100 * row.rms) / acRms : null),
          show: (row) => formatPercent(acRms > 0 ? (100 * row.rms) / acRms : null, 3),
        },
      ]}
      rows={rows}
      rowKey={(row) => row.count}
      fileName="residual-by-orders"
      maxHeight="320px"
    />
  );
}
