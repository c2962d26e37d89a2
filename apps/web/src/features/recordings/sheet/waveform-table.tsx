import type { Recording, Waveform } from '@overtally/contracts';
import { useMemo } from 'react';
import type { TableColumn } from '../../../components/table-column.js';
import { TableTwin } from '../../../components/table-twin.js';
import { formatSi } from '../../../lib/format.js';

interface WaveformRow {
  timeS: number;
  lower: number | null;
  upper: number | null;
}

function rowsOf({ kind, startS, stepS, values, minimum, maximum }: Waveform): WaveformRow[] {
  const lower = kind === 'samples' ? values : minimum;
  const upper = kind === 'samples' ? values : maximum;
  return lower.map((value, i) => ({ timeS: startS + i * stepS, lower: value, upper: upper[i] ?? null }));
}

/** Table twin of the waveform: the samples in view, or lowest and highest of each bin. */
export function WaveformTable({ waveform, recording }: { waveform: Waveform; recording: Recording }) {
  const { unit, kind } = waveform;
  const columns = useMemo<TableColumn<WaveformRow>[]>(() => {
    const amount = (key: 'lower' | 'upper', header: string): TableColumn<WaveformRow> => ({
      key,
      header,
      fileHeader: unit ? `${header} (${unit})` : header,
      align: 'right',
      value: (row) => row[key],
      show: (row) => formatSi(row[key], unit),
    });
    return [
      {
        key: 'time',
        header: kind === 'samples' ? 'Time' : 'From',
        fileHeader: kind === 'samples' ? 'Time (s)' : 'From (s)',
        align: 'right',
        value: (row) => row.timeS,
        show: (row) => formatSi(row.timeS, 's', { digits: 6 }),
      },
      ...(kind === 'samples'
        ? [amount('lower', 'Sample')]
        : [amount('lower', 'Lowest'), amount('upper', 'Highest')]),
    ];
  }, [unit, kind]);
  const rows = useMemo(() => rowsOf(waveform), [waveform]);
  return (
    <TableTwin
      caption="Waveform in view"
      columns={columns}
      rows={rows}
      rowKey={(row) => row.timeS}
      fileName={`${recording.number}-waveform`}
      maxHeight="320px"
    />
  );
}
