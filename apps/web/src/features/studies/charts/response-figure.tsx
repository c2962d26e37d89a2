import { Text } from '@chakra-ui/react';
import type { ResponsePoint } from '@overtally/dsp';
import { CurveChart, type ChartMark } from '../../../components/charts/curve-chart.js';
import { FigureFrame } from '../../../components/figure-frame.js';
import type { TableColumn } from '../../../components/table-column.js';
import { TableTwin } from '../../../components/table-twin.js';
import { formatDb, formatFixed, formatSi } from '../../../lib/format.js';
import type { Steady } from '../predict.js';
import { useSpreadBand } from '../varying/spread-context.js';
import { usePrediction } from '../study-store.js';
import { extent, frequencyAxis, linearAxis } from './axes.js';

const columns: TableColumn<ResponsePoint & { order: number | null }>[] = [
  {
    key: 'order',
    header: 'Order',
    fileHeader: 'Order',
    align: 'right',
    value: (row) => row.order,
  },
  {
    key: 'frequency',
    header: 'Frequency',
    fileHeader: 'Frequency (Hz)',
    align: 'right',
    value: (row) => row.frequencyHz,
    show: (row) => formatSi(row.frequencyHz, 'Hz'),
  },
  {
    key: 'gain',
    header: 'Gain',
    fileHeader: 'Gain',
    align: 'right',
    value: (row) => row.magnitude,
    show: (row) => formatSi(row.magnitude, ''),
  },
  {
    key: 'db',
    header: 'Gain in dB',
    fileHeader: 'Gain (dB)',
    align: 'right',
    value: (row) => row.magnitudeDb,
    show: (row) => formatDb(row.magnitudeDb, 2),
  },
  {
    key: 'phase',
    header: 'Phase',
    fileHeader: 'Phase (deg)',
    align: 'right',
    value: (row) => row.phaseDeg,
    show: (row) => formatFixed(row.phaseDeg, 1, '°'),
  },
];

/** Gain and phase over frequency (Bode), the orders of the input marked on both. */
export function ResponseFigure() {
  return (
    <FigureFrame
      title="Frequency response"
      subtitle="Bode plot; dots are the orders of the input"
      table={<ResponseTable />}
    >
      <ResponseCurves />
    </FigureFrame>
  );
}

function ResponseTable() {
  const prediction = usePrediction();
  if (prediction.kind !== 'steady') return null;
  const { bode, result } = prediction.steady;
  const held = result.orders.filter(({ inputRms }) => inputRms > 0);
  const rows = [
    ...bode.orders.map((point, i) => ({ ...point, order: held[i]?.order ?? null })),
    ...bode.points.map((point) => ({ ...point, order: null })),
  ];
  return (
    <TableTwin
      caption="Frequency response, orders first"
      columns={columns}
      rows={rows}
      rowKey={(row) => `${row.order} ${row.frequencyHz}`}
      fileName="frequency-response"
      maxHeight="320px"
    />
  );
}

function ResponseCurves() {
  const prediction = usePrediction();
  const band = useSpreadBand();
  if (prediction.kind !== 'steady') return null;
  const { bode, peaks, warnings } = prediction.steady;
  const frequencies = bode.points.map(({ frequencyHz }) => frequencyHz);
  const gains = bode.points.map(({ magnitudeDb }) => magnitudeDb);
  const x = frequencyAxis(frequencies[0]!, frequencies.at(-1)!);
  const [low, high] = extent(gains);
  const y = linearAxis([Math.max(low, high - 120), high], 'dB');
  const warned = new Set(warnings.map(({ frequencyHz }) => frequencyHz));
  const marks = orderMarks(bode, warned);
  const inside = peaks.filter(({ frequencyHz }) => frequencyHz > x.from && frequencyHz < x.to);
  return (
    <>
      <CurveChart
        label="Gain over frequency with the orders of the input"
        height={210}
        x={x}
        y={y}
        band={band?.response ?? null}
        curves={[{ x: frequencies, y: gains, tone: 'act' }]}
        marks={marks.gain}
        uprights={inside.map(({ frequencyHz }) => ({ x: frequencyHz, tone: 'near', label: 'peak' }))}
        readout={{
          x: frequencies,
          at: (i) =>
            `${formatSi(frequencies[i], 'Hz')}: ${formatDb(gains[i])}, ${formatFixed(bode.phaseDeg[i], 1, '°')}`,
        }}
      />
      <CurveChart
        label="Phase over frequency with the orders of the input"
        height={150}
        x={x}
        y={linearAxis(extent(bode.phaseDeg), '°')}
        curves={[{ x: frequencies, y: bode.phaseDeg, tone: 'act' }]}
        marks={marks.phase}
      />
      {band ? (
        <Text fontSize="xs" color="inkSoft">
          The shaded band is the spread of the values, as computed below.
        </Text>
      ) : null}
    </>
  );
}

function orderMarks({ points, phaseDeg, orders }: Steady['bode'], warned: ReadonlySet<number>) {
  const mark = (frequencyHz: number, value: number | null): ChartMark[] =>
    value === null
      ? []
      : [
          {
            x: frequencyHz,
            y: value,
            tone: warned.has(frequencyHz) ? 'over' : 'ink',
            shape: warned.has(frequencyHz) ? 'ring' : 'dot',
          },
        ];
  let at = 0;
  return {
    gain: orders.flatMap(({ frequencyHz, magnitudeDb }) => mark(frequencyHz, magnitudeDb)),
    // On the drawn curve the phase is continuous: an order takes the turn of its neighbour.
    phase: orders.flatMap(({ frequencyHz, phaseDeg: own }) => {
      while (at < points.length - 1 && points[at]!.frequencyHz < frequencyHz) at++;
      const near = phaseDeg[at];
      if (own === null || near === null || near === undefined) return [];
      return mark(frequencyHz, own + 360 * Math.round((near - own) / 360));
    }),
  };
}
