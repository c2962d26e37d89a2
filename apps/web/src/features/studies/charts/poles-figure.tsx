import type { Root } from '@overtally/dsp';
import { CurveChart, type ChartMark } from '../../../components/charts/curve-chart.js';
import { FigureFrame } from '../../../components/figure-frame.js';
import { TableTwin } from '../../../components/table-twin.js';
import { formatFixed, formatSi } from '../../../lib/format.js';
import { usePrediction } from '../study-store.js';
import { extent, linearAxis } from './axes.js';

interface Row extends Root {
  what: 'pole' | 'zero';
}

/** Poles and zeros of all stages that are on. */
export function PolesFigure() {
  return (
    <FigureFrame
      title="Poles and zeros"
      subtitle="Crosses: poles. Rings: zeros. A stable cascade has all poles left of the upright line"
      table={<PolesTable />}
    >
      <PolesMap />
    </FigureFrame>
  );
}

function useRows(): Row[] {
  const prediction = usePrediction();
  if (prediction.kind === 'faulty') return [];
  const { poles, zeros } = prediction.facts;
  return [
    ...poles.map((root) => ({ ...root, what: 'pole' as const })),
    ...zeros.map((root) => ({ ...root, what: 'zero' as const })),
  ];
}

function PolesMap() {
  const rows = useRows();
  const [left, right] = extent([0, ...rows.map(({ re }) => re)]);
  const [low, high] = extent([0, ...rows.map(({ im }) => im)]);
  const reach = Math.max(right, -left, high, -low) || 1;
  const marks = rows.map<ChartMark>(({ re, im, multiplicity, what }) => ({
    x: re,
    y: im,
    tone: what === 'zero' ? 'ink-soft' : re < 0 ? 'ink' : 'over',
    shape: what === 'zero' ? 'ring' : 'cross',
    ...(multiplicity > 1 && { label: `× ${multiplicity}` }),
  }));
  return (
    <CurveChart
      label="Poles and zeros in the plane of s"
      height={250}
      hasAxes
      x={{
        ...linearAxis([Math.min(left, -0.15 * reach), Math.max(right, 0.15 * reach)], '', 0.1),
        title: 'Real part, 1/s',
      }}
      y={linearAxis([Math.min(low, -0.15 * reach), Math.max(high, 0.15 * reach)], '', 0.1)}
      marks={marks}
    />
  );
}

function PolesTable() {
  const rows = useRows();
  const number = { align: 'right' as const };
  return (
    <TableTwin
      caption="Poles and zeros"
      columns={[
        { key: 'what', header: 'What', fileHeader: 'What', value: (row) => row.what },
        {
          ...number,
          key: 're',
          header: 'Real part, 1/s',
          fileHeader: 'Real part (1/s)',
          value: (row) => row.re,
          show: (row) => formatSi(row.re, ''),
        },
        {
          ...number,
          key: 'im',
          header: 'Imaginary part, 1/s',
          fileHeader: 'Imaginary part (1/s)',
          value: (row) => row.im,
          show: (row) => formatSi(row.im, ''),
        },
        {
          ...number,
          key: 'frequency',
          header: 'Natural frequency',
          fileHeader: 'Natural frequency (Hz)',
          value: ({ re, im }) => Math.hypot(re, im) / (2 * Math.PI),
          show: ({ re, im }) => formatSi(Math.hypot(re, im) / (2 * Math.PI), 'Hz'),
        },
        {
          ...number,
          key: 'damping',
          header: 'Damping ratio',
          fileHeader: 'Damping ratio',
          value: ({ re, im }) => (re === 0 && im === 0 ? null : (0 - re) / Math.hypot(re, im)),
          show: ({ re, im }) => formatFixed(re === 0 && im === 0 ? null : (0 - re) / Math.hypot(re, im), 4),
        },
        {
          ...number,
          key: 'times',
          header: 'Times',
          fileHeader: 'Multiplicity',
          value: (row) => row.multiplicity,
        },
      ]}
      rows={rows}
      rowKey={(row) => `${row.what} ${row.re} ${row.im}`}
      fileName="poles-and-zeros"
      maxHeight="320px"
    />
  );
}
