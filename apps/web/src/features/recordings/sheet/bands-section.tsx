import { Text } from '@chakra-ui/react';
import type { Band, ChannelAnalysis, Recording } from '@overtally/contracts';
import { useMemo } from 'react';
import { FoldingFigure } from '../../../components/folding-figure.js';
import { Plot } from '../../../components/plot.js';
import type { TableColumn } from '../../../components/table-column.js';
import { TableTwin } from '../../../components/table-twin.js';
import { formatHz, formatSi } from '../../../lib/format.js';
import { usePalette } from '../../../lib/theme/use-palette.js';
import { bandChart } from '../charts/band-chart.js';

const height = 220;
const title = 'Bands of 200 Hz from 2 kHz to 9 kHz';

/** Emission above the harmonics in bands of 200 Hz (IEC 61000-4-7, annex B). */
export function BandsSection({ recording, channel }: { recording: Recording; channel: ChannelAnalysis }) {
  const palette = usePalette();
  const { bands, unit } = channel;
  const chart = useMemo(() => bandChart(bands, unit, palette), [bands, unit, palette]);
  const columns = useMemo(() => columnsOf(unit), [unit]);
  const largest = bands.toSorted((a, b) => b.rms - a.rms)[0];
  if (!largest) return null;
  return (
    <FoldingFigure
      title={title}
      subtitle={`largest ${formatSi(largest.rms, unit)}, around ${formatHz(largest.centreHz, 0)}`}
      table={
        <TableTwin
          caption={`${title}, ${channel.name}`}
          columns={columns}
          rows={bands}
          rowKey={(row) => row.centreHz}
          fileName={`${recording.number}-${channel.name}-bands`}
          maxHeight="420px"
        />
      }
    >
      <Plot label={`${title}, ${channel.name}`} height={height} traces={chart.traces} layout={chart.layout} />
      <Text fontSize="xs" color="inkSoft">
        Bars: root mean square over the windows. △ highest window. IEC 61000-4-7, annex B, informative.
      </Text>
    </FoldingFigure>
  );
}

function columnsOf(unit: string): TableColumn<Band>[] {
  const amount = (key: 'rms' | 'maxRms', header: string): TableColumn<Band> => ({
    ...{ key, header, fileHeader: unit ? `${header} (${unit})` : header, align: 'right' },
    value: (row) => row[key],
    show: (row) => formatSi(row[key], unit),
  });
  return [
    {
      key: 'centre',
      header: 'Band',
      fileHeader: 'Centre (Hz)',
      align: 'right',
      value: (row) => row.centreHz,
      show: (row) => `${row.centreHz - 100} to ${formatHz(row.centreHz + 100, 0)}`,
    },
    amount('rms', 'rms'),
    amount('maxRms', 'Highest window'),
  ];
}
