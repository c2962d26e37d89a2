import type { Spectrum } from '@overtally/contracts';
import { useMemo } from 'react';
import type { TableColumn } from '../../../components/table-column.js';
import { TableTwin } from '../../../components/table-twin.js';
import { formatHz, formatSi } from '../../../lib/format.js';
import { densityUnit, type FrequencyRange } from '../charts/frequency-chart.js';

interface SpectrumRow {
  frequencyHz: number;
  rms: number;
}

interface FrequencyTableProps {
  spectrum: Spectrum;
  range: FrequencyRange;
  caption: string;
  fileName: string;
}

/** Table twin of the spectrum: the lines of the range in view. */
export function FrequencyTable({ spectrum, range, caption, fileName }: FrequencyTableProps) {
  const isDensity = spectrum.scaling === 'density';
  const unit = isDensity ? densityUnit(spectrum.unit) : spectrum.unit;
  const columns = useMemo<TableColumn<SpectrumRow>[]>(
    () => [
      {
        key: 'frequency',
        header: 'Frequency',
        fileHeader: 'Frequency (Hz)',
        align: 'right',
        value: (row) => row.frequencyHz,
        show: (row) => formatHz(row.frequencyHz, 2),
      },
      {
        key: 'rms',
        header: isDensity ? 'Density' : 'rms',
        fileHeader: `${isDensity ? 'Density' : 'rms'}${unit ? ` (${unit})` : ''}`,
        align: 'right',
        value: (row) => row.rms,
        show: (row) => formatSi(row.rms, unit),
      },
    ],
    [isDensity, unit],
  );
  const rows = useMemo(
    () =>
      spectrum.frequencyHz
        .map((frequencyHz, i) => ({ frequencyHz, rms: spectrum.rms[i] ?? 0 }))
        .filter(({ frequencyHz }) => frequencyHz >= range.fromHz && frequencyHz <= range.toHz),
    [spectrum, range],
  );
  return (
    <TableTwin
      caption={caption}
      columns={columns}
      rows={rows}
      rowKey={(row) => row.frequencyHz}
      fileName={fileName}
      maxHeight="560px"
    />
  );
}
