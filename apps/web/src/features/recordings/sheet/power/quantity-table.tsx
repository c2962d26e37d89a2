import { useMemo } from 'react';
import type { TableColumn } from '../../../../components/table-column.js';
import { TableTwin } from '../../../../components/table-twin.js';
import { fileUnit, plainSymbol, showQuantity } from './quantities.js';
import { QuantitySymbol, type GridEntry } from './quantity-grid.js';

interface QuantityTableProps {
  caption: string;
  fileName: string;
  entries: readonly GridEntry[];
}

/** Table twin of grouped quantities: one below the other, with their names. */
export function QuantityTable({ caption, fileName, entries }: QuantityTableProps) {
  const columns = useMemo<TableColumn<GridEntry>[]>(
    () => [
      {
        key: 'symbol',
        header: 'Symbol',
        fileHeader: 'Symbol',
        value: ({ quantity }) => plainSymbol(quantity),
        show: ({ quantity }) => <QuantitySymbol quantity={quantity} />,
      },
      {
        key: 'value',
        header: 'Value',
        fileHeader: 'Value',
        align: 'right',
        value: ({ value }) => value,
        show: ({ value, quantity }) => showQuantity(value, quantity),
      },
      { key: 'name', header: 'Quantity', fileHeader: 'Quantity', value: ({ quantity }) => quantity.name },
    ],
    [],
  );
  const unit: TableColumn<GridEntry> = {
    key: 'unit',
    header: 'Unit',
    fileHeader: 'Unit',
    value: ({ quantity }) => fileUnit(quantity),
  };
  return (
    <TableTwin
      caption={caption}
      columns={columns}
      fileColumns={[...columns, unit]}
      rows={entries}
      rowKey={({ quantity }) => quantity.name}
      fileName={fileName}
    />
  );
}
