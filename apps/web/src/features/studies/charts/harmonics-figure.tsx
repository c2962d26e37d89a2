import { Text } from '@chakra-ui/react';
import type { OrderVerdict } from '@overtally/contracts';
import type { OrderThroughStages } from '@overtally/dsp';
import { useState } from 'react';
import { amplitudeAxis, amplitudeRange, type Scale } from '../../../components/charts/amplitude-axis.js';
import { CurveChart } from '../../../components/charts/curve-chart.js';
import type { AxisTicks } from '../../../components/charts/si-ticks.js';
import { ceilingSteps } from '../../../components/charts/limit-ceiling.js';
import { FigureFrame } from '../../../components/figure-frame.js';
import { Segmented } from '../../../components/segmented.js';
import type { TableColumn } from '../../../components/table-column.js';
import { TableTwin } from '../../../components/table-twin.js';
import { partWords, verdictTone } from '../../../components/verdict/verdict-words.js';
import { formatDb, formatFixed, formatPercent, formatSi } from '../../../lib/format.js';
import { useDraftPart, usePrediction } from '../study-store.js';
import { useSpreadBand } from '../varying/spread-context.js';
import { orderAxis } from './axes.js';

const scales = [
  { value: 'log', label: 'Log' },
  { value: 'linear', label: 'Linear' },
] as const;

/** Orders before and behind the stages under the limit as a ceiling. */
export function HarmonicsFigure() {
  const [scale, setScale] = useState<Scale>('log');
  return (
    <FigureFrame
      title="Harmonics before and behind"
      subtitle="Hollow: input. Filled: predicted output"
      toggles={
        <Segmented label="Scale of the amplitudes" value={scale} options={scales} onChange={setScale} />
      }
      table={<HarmonicsTable />}
    >
      <HarmonicBars scale={scale} />
    </FigureFrame>
  );
}

interface Row extends OrderThroughStages {
  before: OrderVerdict | null;
  after: OrderVerdict | null;
}

function useRows(): Row[] {
  const prediction = usePrediction();
  if (prediction.kind !== 'steady') return [];
  const { result, before, after } = prediction.steady;
  const of = (orders: readonly OrderVerdict[] | undefined, order: number) =>
    orders?.find((entry) => entry.order === order) ?? null;
  return result.orders.map((row) => ({
    ...row,
    before: of(before?.orders, row.order),
    after: of(after?.orders, row.order),
  }));
}

function HarmonicBars({ scale }: { scale: Scale }) {
  const rows = useRows();
  const inputUnit = useDraftPart((draft) => draft.inputUnit);
  const outputUnit = useDraftPart((draft) => draft.outputUnit);
  const inputQuantity = useDraftPart((draft) => draft.inputQuantity);
  const outputQuantity = useDraftPart((draft) => draft.outputQuantity);
  const spread = useSpreadBand();
  if (rows.length === 0) return null;
  const isSame = inputUnit === outputUnit && inputQuantity === outputQuantity;
  const limits = rows.flatMap(({ order, after }) =>
    after === null || after.limit === null ? [] : [{ order, limit: after.limit }],
  );
  const amounts = [
    ...rows.map(({ outputRms }) => outputRms),
    ...(isSame ? rows.map(({ inputRms }) => inputRms) : []),
  ];
  const range = amplitudeRange(
    amounts,
    limits.map(({ limit }) => limit),
    scale,
    null,
    6,
  );
  const ticks = amplitudeAxis(range, outputUnit) as unknown as AxisTicks;
  const last = rows.reduce((most, { order }) => Math.max(most, order), 1);
  const width = Math.max(2, Math.min(8, 240 / last));
  const orders = rows.map(({ order }) => order);
  return (
    <>
      <CurveChart
        label="rms of each order before and behind the stages, with its limit"
        height={270}
        x={orderAxis(last)}
        y={{ scale, from: range.bottom, to: range.top, ticks }}
        bars={[
          ...(isSame
            ? [
                {
                  x: orders,
                  y: rows.map(({ inputRms }) => inputRms),
                  tones: rows.map(() => 'ink-soft' as const),
                  shift: -width * 0.65,
                  width,
                  isHollow: true,
                },
              ]
            : []),
          {
            x: orders,
            y: rows.map(({ outputRms }) => outputRms),
            tones: rows.map(({ after }) =>
              after !== null && verdictTone(after.result) === 'over' ? ('over' as const) : ('ink' as const),
            ),
            shift: isSame ? width * 0.65 : 0,
            width,
          },
        ]}
        curves={[
          ...(limits.length > 0 ? [{ ...ceilingSteps(limits), tone: 'act' as const }] : []),
          ...(spread ? spreadBars(spread.orders) : []),
        ]}
        readout={{
          x: orders,
          at: (i) => {
            const row = rows[i]!;
            return `Order ${row.order}: ${formatSi(row.inputRms, inputUnit)} to ${formatSi(row.outputRms, outputUnit)}`;
          },
        }}
      />
      <Text fontSize="xs" color="inkSoft">
        {isSame ? '' : `The input, another quantity, stands in the table. `}
        {limits.length > 0 ? 'The stepped line is the limit of each order at the output.' : ''}
      </Text>
    </>
  );
}

/** From the smallest to the largest value of each order over its tolerances. */
const spreadBars = (orders: readonly { order: number; min: number; max: number }[]) => [
  {
    x: orders.flatMap(({ order }) => [order, order, null]),
    y: orders.flatMap(({ min, max }) => [min, max, null]),
    tone: 'near' as const,
    width: 2.4,
  },
];

function HarmonicsTable() {
  const rows = useRows();
  const inputUnit = useDraftPart((draft) => draft.inputUnit);
  const outputUnit = useDraftPart((draft) => draft.outputUnit);
  return (
    <TableTwin
      caption="Harmonics before and behind the stages"
      columns={harmonicColumns(inputUnit, outputUnit)}
      rows={rows}
      rowKey={(row) => row.order}
      fileName="harmonics-predicted"
      maxHeight="360px"
    />
  );
}

function harmonicColumns(inputUnit: string, outputUnit: string): TableColumn<Row>[] {
  const headed = (text: string, unit: string) => (unit ? `${text} (${unit})` : text);
  const number = { align: 'right' as const };
  return [
    { ...number, key: 'order', header: 'Order', fileHeader: 'Order', value: (row) => row.order },
    {
      ...number,
      key: 'frequency',
      header: 'Frequency',
      fileHeader: 'Frequency (Hz)',
      value: (row) => row.frequencyHz,
      show: (row) => formatSi(row.frequencyHz, 'Hz'),
    },
    {
      ...number,
      key: 'input',
      header: 'Before',
      fileHeader: headed('rms before', inputUnit),
      value: (row) => row.inputRms,
      show: (row) => formatSi(row.inputRms, inputUnit),
    },
    {
      ...number,
      key: 'output',
      header: 'Behind',
      fileHeader: headed('rms behind', outputUnit),
      value: (row) => row.outputRms,
      show: (row) => formatSi(row.outputRms, outputUnit),
    },
    {
      ...number,
      key: 'gain',
      header: 'Gain',
      fileHeader: 'Gain',
      value: (row) => row.gain,
      show: (row) => (row.gain === null ? formatSi(null, '') : formatDb(20 * Math.log10(row.gain), 2)),
    },
    {
      ...number,
      key: 'phaseBefore',
      header: 'Phase before',
      fileHeader: 'Phase before, cosine form (deg)',
      value: (row) => row.inputPhaseDeg,
      show: (row) => formatFixed(row.inputPhaseDeg, 1, '°'),
    },
    {
      ...number,
      key: 'phaseBehind',
      header: 'Phase behind',
      fileHeader: 'Phase behind, cosine form (deg)',
      value: (row) => row.outputPhaseDeg,
      show: (row) => formatFixed(row.outputPhaseDeg, 1, '°'),
    },
    {
      ...number,
      key: 'limit',
      header: 'Limit behind',
      fileHeader: headed('Limit behind', outputUnit),
      value: (row) => row.after?.limit ?? null,
      show: (row) => formatSi(row.after?.limit, outputUnit),
    },
    {
      ...number,
      key: 'share',
      header: 'Share',
      fileHeader: 'Share of the limit (%)',
      value: (row) => row.after?.sharePercent ?? null,
      show: (row) => formatPercent(row.after?.sharePercent),
      tone: (row) => (row.after ? verdictTone(row.after.result) : undefined),
    },
    {
      key: 'result',
      header: 'Result',
      fileHeader: 'Result',
      value: (row) => (row.after ? partWords[row.after.result] : null),
    },
  ];
}
