import { Text } from '@chakra-ui/react';
import type { ThreePhase } from '@overtally/contracts';
import { FigureFrame } from '../../../../components/figure-frame.js';
import { formatHz } from '../../../../lib/format.js';
import { threePhaseQuantities, type PowerQuantity, type ThreePhaseKey } from './quantities.js';
import { QuantityGrid, type GridEntry, type GridRow } from './quantity-grid.js';
import { QuantityTable } from './quantity-table.js';

const columns = ['Effective', 'Fundamental', 'Positive sequence', 'What remains'];

/** Grouping of IEEE 1459-2010 for unbalanced three-phase systems. */
const groups: readonly { caption: string; cells: readonly (readonly ThreePhaseKey[])[] }[] = [
  { caption: 'Voltage', cells: [['Ve'], ['Ve1'], [], []] },
  { caption: 'Current', cells: [['Ie'], ['Ie1'], [], []] },
  { caption: 'Apparent', cells: [['Se'], ['Se1'], ['S1plus'], ['SeN', 'SU1']] },
  { caption: 'Active', cells: [['P'], [], ['P1plus'], []] },
  { caption: 'Nonactive', cells: [[], [], ['Q1plus'], []] },
  { caption: 'Power factor', cells: [['PFe'], [], [], []] },
  { caption: 'Arithmetic', cells: [['Sarithmetic'], [], [], []] },
];

const lineQuantity = (phases: string): PowerQuantity => ({
  symbol: 'V',
  subscript: phases,
  unit: 'V',
  name: `rms voltage between phases ${phases.slice(0, 1)} and ${phases.slice(1)}`,
});
const neutral: PowerQuantity = {
  symbol: 'I',
  subscript: 'N',
  unit: 'A',
  name: 'rms of the sum of the currents',
};
const ratio = (sign: string, kind: 'negative' | 'zero', of: string): PowerQuantity => ({
  symbol: sign,
  subscript: kind === 'negative' ? '2' : '0',
  unit: 'percent',
  name: `${kind} over positive sequence of the ${of}, order 1`,
});

interface EffectiveFigureProps {
  set: ThreePhase;
  name: string;
  fileName: string;
}

/** Three phases together: effective quantities, unbalance and neutral. */
export function EffectiveFigure({ set, name, fileName }: EffectiveFigureProps) {
  const entry = (key: ThreePhaseKey): GridEntry => ({
    quantity: threePhaseQuantities[key],
    value: set[key],
  });
  const rows: GridRow[] = groups.map(({ caption, cells }) => ({
    caption,
    cells: cells.map((keys) => keys.map(entry)),
  }));
  const balance = balanceRows(set);
  const all = [...rows, ...balance].flatMap(({ cells }) => cells.flat());
  const wires = set.wires === '3w' ? 'three wires' : 'four wires';
  return (
    <FigureFrame
      title={`Power of three phases, ${name}`}
      subtitle={`IEEE 1459, ${wires}, fundamental ${formatHz(set.frequencyHz)}`}
      table={<QuantityTable caption={`Power of ${name}`} fileName={fileName} entries={all} />}
    >
      <QuantityGrid caption={`Effective quantities of ${name}`} columns={columns} rows={rows} />
      <QuantityGrid
        caption={`Voltages between phases, unbalance and neutral of ${name}`}
        columns={[
          'Voltages between phases',
          'Unbalance of the voltages',
          'Unbalance of the currents',
          'Neutral',
        ]}
        rows={balance}
      />
      <Text fontSize="xs" color="inkSoft" mt="2">
        P is positive into the load, Q where the current lags. Unbalance: of the fundamental, over its
        positive sequence.
      </Text>
    </FigureFrame>
  );
}

function balanceRows({
  lineToLineRms,
  voltageUnbalance,
  currentUnbalance,
  neutralRms,
}: ThreePhase): GridRow[] {
  const between = ['12', '23', '31'].map((phases, i) => ({
    quantity: lineQuantity(phases),
    value: lineToLineRms[i] ?? null,
  }));
  const unbalance = (sign: string, of: string, { u2, u0 }: ThreePhase['voltageUnbalance']) => [
    { quantity: ratio(sign, 'negative', of), value: u2 },
    { quantity: ratio(sign, 'zero', of), value: u0 },
  ];
  return [
    {
      caption: 'Balance',
      cells: [
        between,
        unbalance('u', 'voltages', voltageUnbalance),
        unbalance('i', 'currents', currentUnbalance),
        [{ quantity: neutral, value: neutralRms }],
      ],
    },
  ];
}
