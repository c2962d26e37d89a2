import { Box, Flex, Text } from '@chakra-ui/react';
import type { Recording, Study, StudyComparison } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { amplitudeAxis, amplitudeRange } from '../../../components/charts/amplitude-axis.js';
import { CurveChart } from '../../../components/charts/curve-chart.js';
import type { AxisTicks } from '../../../components/charts/si-ticks.js';
import { ErrorState } from '../../../components/error-state.js';
import { FoldingFigure } from '../../../components/folding-figure.js';
import { FormField, SelectInput } from '../../../components/form-field.js';
import { LoadingState } from '../../../components/loading-state.js';
import { TableTwin } from '../../../components/table-twin.js';
import { formatFixed, formatPercent, formatSi, signed } from '../../../lib/format.js';
import { comparisonQuery } from '../api/get-comparison.js';
import { orderAxis } from '../charts/axes.js';

interface ComparisonPartProps {
  study: Study;
  /** Those with a finished analysis. */
  recordings: readonly Recording[];
}

interface Measured {
  analysisId: string;
  channel: number;
}

/** What the saved version predicts, held against a recording of the stages once they are built. */
export function ComparisonPart({ study, recordings }: ComparisonPartProps) {
  const [measured, setMeasured] = useState<Measured | null>(null);
  const comparison = useQuery({
    ...comparisonQuery(study.id, study.version, measured?.analysisId ?? '', measured?.channel ?? 0),
    enabled: measured !== null,
  });
  return (
    <FoldingFigure
      title="Predicted against measured"
      subtitle={`Version ${study.version} as it was saved, against a recording of what was built`}
      table={comparison.data ? <ComparisonTable comparison={comparison.data} /> : undefined}
    >
      <MeasuredFields recordings={recordings} onChoose={setMeasured} />
      {comparison.isFetching ? <LoadingState label="Comparing" lines={3} /> : null}
      {comparison.error ? <ErrorState title="Not compared" error={comparison.error} /> : null}
      {comparison.data ? <ComparisonChart comparison={comparison.data} /> : null}
    </FoldingFigure>
  );
}

function MeasuredFields({
  recordings,
  onChoose,
}: Pick<ComparisonPartProps, 'recordings'> & { onChoose: (measured: Measured | null) => void }) {
  const [recordingId, setRecordingId] = useState('');
  const [channel, setChannel] = useState('');
  const recording = recordings.find(({ id }) => id === recordingId);
  return (
    <Flex gap="3" maxW="2xl" mb="3">
      <FormField label="Recording of what was built">
        <SelectInput
          options={[
            { value: '', label: 'Choose' },
            ...recordings.map(({ id, number, name }) => ({ value: id, label: `${number} ${name}` })),
          ]}
          value={recordingId}
          onChange={(event) => {
            setRecordingId(event.target.value);
            setChannel('');
            onChoose(null);
          }}
        />
      </FormField>
      {recording ? (
        <FormField label="Channel">
          <SelectInput
            options={[
              { value: '', label: 'Choose' },
              ...recording.channels.map(({ index, name, unit }) => ({
                value: String(index),
                label: unit ? `${name} in ${unit}` : name,
              })),
            ]}
            value={channel}
            onChange={({ target: { value } }) => {
              const { latestAnalysisId } = recording;
              setChannel(value);
              onChoose(
                value === '' || latestAnalysisId === null
                  ? null
                  : { analysisId: latestAnalysisId, channel: Number(value) },
              );
            }}
          />
        </FormField>
      ) : null}
    </Flex>
  );
}

function ComparisonChart({ comparison }: { comparison: StudyComparison }) {
  const { orders, unit, cautions, predictedThdF, measuredThdF, predictedHz, measuredHz } = comparison;
  const amounts = orders.flatMap(({ predictedRms, measuredRms }) => [predictedRms, measuredRms]);
  const range = amplitudeRange(amounts, [], 'log', null, 6);
  const last = orders.reduce((most, { order }) => Math.max(most, order), 1);
  const width = Math.max(2, Math.min(8, 240 / last));
  const x = orders.map(({ order }) => order);
  const bars = (values: (number | null)[], shift: number, isHollow: boolean) => ({
    ...{ x, y: values, shift, width, isHollow },
    tones: orders.map(() => (isHollow ? ('act' as const) : ('ink' as const))),
  });
  const percent = (ratio: number | null) => formatPercent(ratio === null ? null : 100 * ratio, 2);
  return (
    <Box>
      <CurveChart
        label="rms of each order, predicted and measured"
        height={240}
        x={orderAxis(last)}
        y={{
          scale: 'log',
          from: range.bottom,
          to: range.top,
          ticks: amplitudeAxis(range, unit) as unknown as AxisTicks,
        }}
        bars={[
          bars(
            orders.map(({ predictedRms }) => predictedRms),
            -width * 0.65,
            true,
          ),
          bars(
            orders.map(({ measuredRms }) => measuredRms),
            width * 0.65,
            false,
          ),
        ]}
        readout={{
          x,
          at: (i) =>
            `Order ${x[i]}: predicted ${formatSi(orders[i]?.predictedRms, unit)}, measured ${formatSi(orders[i]?.measuredRms, unit)}`,
        }}
      />
      <Text fontSize="13px" color="inkSoft">
        {`Hollow: predicted. Filled: measured. THD ${percent(predictedThdF)} predicted, ${percent(measuredThdF)} measured; fundamental ${formatFixed(predictedHz, 3, 'Hz')} and ${formatFixed(measuredHz, 3, 'Hz')}.`}
      </Text>
      {cautions.map((caution) => (
        <Text key={caution} fontSize="13px" color="near">
          {caution}
        </Text>
      ))}
    </Box>
  );
}

function ComparisonTable({ comparison: { orders, unit } }: { comparison: StudyComparison }) {
  type Row = StudyComparison['orders'][number];
  const amount = (key: 'predictedRms' | 'measuredRms' | 'measuredUncertainty', header: string) => ({
    key,
    header,
    fileHeader: unit ? `${header} (${unit})` : header,
    align: 'right' as const,
    value: (row: Row) => row[key],
    show: (row: Row) => formatSi(row[key], unit),
  });
  return (
    <TableTwin
      caption="Predicted against measured, order by order"
      columns={[
        { key: 'order', header: 'Order', fileHeader: 'Order', align: 'right', value: (row) => row.order },
        amount('predictedRms', 'Predicted'),
        amount('measuredRms', 'Measured'),
        amount('measuredUncertainty', '± U, k = 2'),
        {
          key: 'difference',
          header: 'Difference',
          fileHeader: 'Difference (% of measured)',
          align: 'right',
          value: (row) => row.differencePercent,
          show: (row) => signed(formatPercent(row.differencePercent)),
        },
      ]}
      rows={orders}
      rowKey={(row) => row.order}
      fileName="predicted-against-measured"
      maxHeight="360px"
    />
  );
}
