import type { PowerPair } from '@overtally/contracts';
import { FigureFrame } from '../../../../components/figure-frame.js';
import type { TableColumn } from '../../../../components/table-column.js';
import { TableTwin } from '../../../../components/table-twin.js';
import { formatFixed, formatSi } from '../../../../lib/format.js';
import { QuantitySymbol } from './quantity-grid.js';

interface Factor {
  name: string;
  symbol: string;
  subscript: string;
  value: number | null;
  basis: string;
}

const columns: TableColumn<Factor>[] = [
  {
    key: 'symbol',
    header: 'Symbol',
    fileHeader: 'Symbol',
    value: ({ symbol, subscript }) => symbol + subscript,
    show: (row) => <QuantitySymbol quantity={{ ...row, unit: 'ratio' }} />,
  },
  {
    key: 'value',
    header: 'Value',
    fileHeader: 'Value',
    align: 'right',
    value: (row) => row.value,
    show: (row) => formatFixed(row.value, 3),
  },
  { key: 'name', header: 'Factor', fileHeader: 'Factor', value: (row) => row.name },
  {
    key: 'basis',
    header: 'Of what',
    fileHeader: 'Of what',
    value: (row) => row.basis,
    tone: () => 'inkSoft',
  },
];

interface TransformerSectionProps {
  pair: PowerPair;
  /** Of the settings; null: not stated. */
  ratedCurrentA: number | null;
  name: string;
  fileName: string;
}

/** Loss factors of a transformer that feeds the current. */
export function TransformerSection({ pair, ratedCurrentA, name, fileName }: TransformerSectionProps) {
  const { transformer } = pair;
  return (
    <FigureFrame title="Transformer factors" subtitle={`${name}, orders 1 to ${transformer.maxOrder}`}>
      <TableTwin
        caption={`Transformer factors of ${name}`}
        columns={columns}
        rows={factors(transformer, ratedCurrentA)}
        rowKey={(row) => row.name}
        fileName={fileName}
      />
    </FigureFrame>
  );
}

function factors(transformer: PowerPair['transformer'], ratedCurrentA: number | null): Factor[] {
  return [
    {
      ...{ name: 'K-factor, measured current', symbol: 'K', subscript: '' },
      value: transformer.kFactorMeasured,
      basis: 'Σ h² (current of order h / rms of all orders)²',
    },
    {
      ...{ name: 'K-factor, rated current', symbol: 'K', subscript: 'R' },
      value: transformer.kFactorRated,
      basis:
        ratedCurrentA === null
          ? 'UL 1561; needs the rated current, to be stated in the settings'
          : `UL 1561, as above over the rated ${formatSi(ratedCurrentA, 'A', { trim: true })}`,
    },
    {
      ...{ name: 'Harmonic loss factor', symbol: 'F', subscript: 'HL' },
      value: transformer.fhl,
      basis: 'IEEE C57.110, eddy-current losses of the windings',
    },
    {
      ...{ name: 'Harmonic loss factor, other stray losses', symbol: 'F', subscript: 'HL-STR' },
      value: transformer.fhlStr,
      basis: 'IEEE C57.110',
    },
    {
      ...{ name: 'Factor K', symbol: 'K', subscript: '' },
      value: transformer.factorKEn,
      basis: 'BS 7821, EN 50464-3, e = 0.1, q = 1.7',
    },
  ];
}
