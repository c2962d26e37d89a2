import { Text } from '@chakra-ui/react';
import type { PowerPair } from '@overtally/contracts';
import { FigureFrame } from '../../../../components/figure-frame.js';
import { formatHz } from '../../../../lib/format.js';
import { pairQuantities, type PairKey } from './quantities.js';
import { QuantityGrid, type GridEntry, type GridRow } from './quantity-grid.js';
import { QuantityTable } from './quantity-table.js';

const columns = ['Combined', 'Fundamental', 'Nonfundamental'];

/** Grouping of IEEE 1459-2010, table 1, with voltage and current above it. */
const groups: readonly { caption: string; cells: readonly (readonly PairKey[])[] }[] = [
  { caption: 'Voltage', cells: [['V'], ['V1'], ['VH', 'thdV']] },
  { caption: 'Current', cells: [['I'], ['I1'], ['IH', 'thdI']] },
  { caption: 'Apparent', cells: [['S'], ['S1'], ['SN', 'SH']] },
  { caption: 'Active', cells: [['P'], ['P1'], ['PH']] },
  { caption: 'Nonactive', cells: [['N'], ['Q1'], ['DI', 'DV', 'DH']] },
  { caption: 'Ratios', cells: [['PF'], ['PF1'], ['harmonicPollution']] },
];

interface PairFigureProps {
  pair: PowerPair;
  /** "u1 with i1". */
  name: string;
  fileName: string;
}

/** The power of one voltage with its current. */
export function PairFigure({ pair, name, fileName }: PairFigureProps) {
  const entry = (key: PairKey): GridEntry => ({ quantity: pairQuantities[key], value: pair[key] });
  const rows: GridRow[] = groups.map(({ caption, cells }) => ({
    caption,
    cells: cells.map((keys) => keys.map(entry)),
  }));
  const all = groups.flatMap(({ cells }) => cells.flat().map(entry));
  return (
    <FigureFrame
      title={`Power, ${name}`}
      subtitle={`IEEE 1459, fundamental ${formatHz(pair.frequencyHz)}`}
      table={<QuantityTable caption={`Power of ${name}`} fileName={fileName} entries={all} />}
    >
      <QuantityGrid caption={`Power of ${name}, grouped as in IEEE 1459`} columns={columns} rows={rows} />
      <Text fontSize="xs" color="inkSoft" mt="2">
        P is positive into the load, Q₁ where the current lags.
      </Text>
    </FigureFrame>
  );
}
