import type { Series } from '@overtally/contracts';
import { useMemo } from 'react';
import type { TableColumn } from '../../../../components/table-column.js';
import { TableTwin } from '../../../../components/table-twin.js';
import { formatFixed, formatSi } from '../../../../lib/format.js';

interface SeriesRow {
  timeS: number;
  value: number | null;
  flagged: boolean;
}

interface SeriesTableProps {
  series: Series;
  /** Where the analysed span begins in the record. */
  fromS: number;
  title: string;
  fileName: string;
}

/** Table twin of a figure over time. */
export function SeriesTable({ series, fromS, title, fileName }: SeriesTableProps) {
  const { unit } = series;
  const columns = useMemo<TableColumn<SeriesRow>[]>(
    () => [
      {
        key: 'time',
        header: 'From',
        fileHeader: 'From (s)',
        align: 'right',
        value: (row) => row.timeS,
        show: (row) => formatFixed(row.timeS, 3, 's'),
      },
      {
        key: 'value',
        header: 'Value',
        fileHeader: unit ? `Value (${unit})` : 'Value',
        align: 'right',
        value: (row) => row.value,
        show: (row) => formatSi(row.value, unit, { digits: 6 }),
      },
      {
        key: 'flagged',
        header: 'Flagged',
        fileHeader: 'Flagged',
        value: (row) => (row.flagged ? 'flagged' : ''),
        tone: () => 'near',
      },
    ],
    [unit],
  );
  const rows = useMemo(
    () =>
      series.timeS.map((timeS, i) => ({
        timeS: fromS + timeS,
        value: series.value[i] ?? null,
        flagged: series.flagged[i] ?? false,
      })),
    [series, fromS],
  );
  return (
    <TableTwin
      caption={title}
      columns={columns}
      rows={rows}
      rowKey={(row) => row.timeS}
      fileName={fileName}
      maxHeight="420px"
    />
  );
}
