import type { ThreePhase } from '@overtally/contracts';
import { useMemo } from 'react';
import { FigureFrame } from '../../../../components/figure-frame.js';
import type { TableColumn } from '../../../../components/table-column.js';
import { TableTwin } from '../../../../components/table-twin.js';
import {
  fileUnit,
  pairQuantities,
  plainSymbol,
  showQuantity,
  type PairKey,
  type PowerQuantity,
} from './quantities.js';
import { QuantitySymbol } from './quantity-grid.js';

interface PhaseRow {
  quantity: PowerQuantity;
  values: readonly (number | null)[];
}

/** Quantities shown per phase; the rest stands in the power of each pair. */
const shown: readonly PairKey[] = [
  ...(['V', 'I', 'V1', 'I1', 'thdV', 'thdI', 'P', 'P1', 'PH', 'Q1', 'S', 'S1', 'SN', 'N'] as const),
  ...(['PF', 'PF1'] as const),
];

interface PhasesFigureProps {
  set: ThreePhase;
  /** "u1 with i1" and so on. */
  phaseNames: readonly string[];
  fileName: string;
}

/** The same quantities of each phase beside each other. */
export function PhasesFigure({ set, phaseNames, fileName }: PhasesFigureProps) {
  const rows = useMemo<PhaseRow[]>(
    () =>
      shown.map((key) => ({
        quantity: pairQuantities[key],
        values: set.phases.map((phase) => phase[key]),
      })),
    [set.phases],
  );
  const columns = useMemo<TableColumn<PhaseRow>[]>(
    () => [
      {
        key: 'symbol',
        header: 'Symbol',
        fileHeader: 'Symbol',
        value: ({ quantity }) => plainSymbol(quantity),
        show: ({ quantity }) => <QuantitySymbol quantity={quantity} />,
      },
      ...phaseNames.map((name, index): TableColumn<PhaseRow> => ({
        key: `phase-${index}`,
        header: `Phase ${index + 1}, ${name}`,
        fileHeader: `Phase ${index + 1}, ${name}`,
        align: 'right',
        value: ({ values }) => values[index] ?? null,
        show: ({ values, quantity }) => showQuantity(values[index] ?? null, quantity),
      })),
    ],
    [phaseNames],
  );
  const unit: TableColumn<PhaseRow> = {
    key: 'unit',
    header: 'Unit',
    fileHeader: 'Unit',
    value: ({ quantity }) => fileUnit(quantity),
  };
  return (
    <FigureFrame title="By phase" subtitle="IEEE 1459, each phase alone">
      <TableTwin
        caption="Power by phase"
        columns={columns}
        fileColumns={[...columns, unit]}
        rows={rows}
        rowKey={({ quantity }) => plainSymbol(quantity)}
        fileName={fileName}
      />
    </FigureFrame>
  );
}
