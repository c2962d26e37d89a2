import { CurveChart } from '../../../components/charts/curve-chart.js';
import { FigureFrame } from '../../../components/figure-frame.js';
import { TableTwin } from '../../../components/table-twin.js';
import { undrawnOrders } from '@overtally/dsp';
import { Text } from '@chakra-ui/react';
import { formatSi } from '../../../lib/format.js';
import { useDraftPart, usePrediction } from '../study-store.js';
import { extent, linearAxis } from './axes.js';

/** The wave before and behind the stages over two cycles, rebuilt from its orders. */
export function WaveFigure() {
  return (
    <FigureFrame
      title="Waveform over two cycles"
      subtitle="Dashed: input. Full line: predicted output"
      table={<WaveTable />}
    >
      <WaveCurves />
    </FigureFrame>
  );
}

function WaveTable() {
  const prediction = usePrediction();
  const inputUnit = useDraftPart((draft) => draft.inputUnit);
  const outputUnit = useDraftPart((draft) => draft.outputUnit);
  if (prediction.kind !== 'steady') return null;
  const { timeS, input, output } = prediction.steady.result.waveform;
  const rows = Array.from({ length: timeS.length / 2 }, (_, i) => i);
  const column = (key: string, header: string, unit: string, values: Float64Array) => ({
    key,
    header,
    fileHeader: unit ? `${header} (${unit})` : header,
    align: 'right' as const,
    value: (i: number) => values[i]!,
    show: (i: number) => formatSi(values[i], unit),
  });
  return (
    <TableTwin
      caption="One cycle of the waveform before and behind the stages"
      columns={[
        column('time', 'Time', 's', timeS),
        column('before', 'Before', inputUnit, input),
        column('behind', 'Behind', outputUnit, output),
      ]}
      rows={rows}
      rowKey={(i) => i}
      fileName="waveform-predicted"
      maxHeight="320px"
    />
  );
}

function WaveCurves() {
  const prediction = usePrediction();
  const inputUnit = useDraftPart((draft) => draft.inputUnit);
  const outputUnit = useDraftPart((draft) => draft.outputUnit);
  if (prediction.kind !== 'steady') return null;
  const { result } = prediction.steady;
  const { timeS, input, output } = result.waveform;
  const isSame = inputUnit === outputUnit;
  // Of another quantity, the input is drawn with its peak at that of the output.
  const [lowIn, highIn] = extent(input);
  const [lowOut, highOut] = extent(output);
  const factor = isSame ? 1 : (Math.max(highOut, -lowOut) || 1) / (Math.max(highIn, -lowIn) || 1);
  const scaled = isSame ? input : input.map((value) => value * factor);
  const undrawn = undrawnOrders(result.series);
  return (
    <>
      <CurveChart
        label="Waveform before and behind the stages over two cycles"
        height={230}
        hasAxes
        x={{ ...linearAxis([0, timeS.at(-1)! * (1 + 1 / timeS.length)], 's', 0) }}
        y={linearAxis(extent(scaled, output), outputUnit)}
        curves={[
          { x: timeS, y: scaled, tone: 'ink-soft', dash: '5 3', width: 1.2 },
          { x: timeS, y: output, tone: 'ink', width: 1.8 },
        ]}
        readout={{
          x: timeS,
          at: (i) =>
            `${formatSi(timeS[i], 's')}: ${formatSi(input[i], inputUnit)} to ${formatSi(output[i], outputUnit)}`,
        }}
      />
      {isSame ? null : (
        <Text fontSize="xs" color="inkSoft">
          The input is another quantity and drawn with its peak at that of the output.
        </Text>
      )}
      {undrawn.length > 0 ? (
        <Text fontSize="xs" color="near">
          {`Orders without a known phase are not in the curves: ${undrawn.slice(0, 8).join(', ')}${undrawn.length > 8 ? ' …' : ''}. Peak and crest factor are then not known either.`}
        </Text>
      ) : null}
    </>
  );
}
