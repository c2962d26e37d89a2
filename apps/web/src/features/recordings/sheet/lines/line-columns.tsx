import type { ChannelAnalysis, SpectralLine } from '@overtally/contracts';
import type { TableColumn } from '../../../../components/table-column.js';
import { formatDb, formatHz, formatSi } from '../../../../lib/format.js';
import { familyWords } from '../../charts/family-marks.js';
import { FamilyGlyph } from '../family-legend.js';

/** Columns of the largest lines. */
export function lineColumns({ lines, families, unit }: ChannelAnalysis): TableColumn<SpectralLine>[] {
  const largest = lines.reduce((most, { rms }) => Math.max(most, rms), 0);
  const level = ({ rms }: SpectralLine) => (rms > 0 ? 20 * Math.log10(rms / largest) : null);
  return [
    {
      key: 'frequency',
      header: 'Frequency',
      fileHeader: 'Frequency (Hz)',
      align: 'right',
      value: (row) => row.frequencyHz,
      show: (row) => formatHz(row.frequencyHz, 3),
    },
    {
      key: 'rms',
      header: 'rms',
      fileHeader: unit ? `rms (${unit})` : 'rms',
      align: 'right',
      value: (row) => row.rms,
      show: (row) => formatSi(row.rms, unit),
    },
    {
      key: 'level',
      header: 'to the largest',
      fileHeader: 'Relative to the largest (dB)',
      align: 'right',
      value: level,
      show: (row) => formatDb(level(row), 1),
    },
    {
      key: 'family',
      header: 'Proposed series',
      fileHeader: 'Proposed series',
      value: (row) => familyWords(row, families),
      show: (row) => (
        <>
          <FamilyGlyph index={row.familyIndex} />
          {familyWords(row, families)}
        </>
      ),
    },
  ];
}
