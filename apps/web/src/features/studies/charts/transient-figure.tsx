import { Text } from '@chakra-ui/react';
import {
  AnalysisInputError,
  naturalModes,
  periodicTransient,
  stepFigures,
  timeResponse,
  type FourierSeries,
  type TransferFunction,
} from '@overtally/dsp';
import { useDeferredValue, useMemo, useState } from 'react';
import { CurveChart } from '../../../components/charts/curve-chart.js';
import { FoldingFigure } from '../../../components/folding-figure.js';
import { Segmented } from '../../../components/segmented.js';
import { TableTwin } from '../../../components/table-twin.js';
import { formatFixed, formatPercent, formatSi } from '../../../lib/format.js';
import { useDraftPart, usePrediction } from '../study-store.js';
import { extent, linearAxis } from './axes.js';

type Onset = 'step' | 'signal';

const onsets = [
  { value: 'signal', label: 'Input sets in' },
  { value: 'step', label: 'Step' },
] as const;

const POINTS = 900;

/** How stages at rest come to their steady state. */
export function TransientFigure() {
  const [onset, setOnset] = useState<Onset>('signal');
  return (
    <FoldingFigure
      title="Until the steady state"
      subtitle="Stages at rest, the input sets in at t = 0; or a step of height 1"
      toggles={<Segmented label="What sets in" value={onset} options={onsets} onChange={setOnset} />}
      table={<TransientTable onset={onset} />}
    >
      <TransientCurves onset={onset} />
    </FoldingFigure>
  );
}

interface Course {
  timeS: number[];
  values: number[];
  words: string;
}

function useCourse(onset: Onset): Course | { problem: string } | null {
  const prediction = useDeferredValue(usePrediction());
  const series = useDraftPart((draft) => draft.series);
  return useMemo(() => {
    if (prediction.kind !== 'steady') return null;
    const { chain } = prediction.facts;
    try {
      return onset === 'step' ? stepCourse(chain) : signalCourse(series, chain);
    } catch (error) {
      if (error instanceof AnalysisInputError) return { problem: error.message };
      throw error;
    }
  }, [prediction, series, onset]);
}

const evenly = (end: number) => Array.from({ length: POINTS }, (_, i) => (end * i) / (POINTS - 1));

function stepCourse(chain: readonly TransferFunction[]): Course {
  const figures = stepFigures(chain);
  const slowest = naturalModes(chain).reduce((most, mode) => Math.max(most, mode.settlingTimeS ?? 0), 0);
  const timeS = evenly(1.4 * Math.max(figures?.settlingTimeS ?? 0, slowest, 1e-9));
  const response = timeResponse(chain, 'step');
  const parts = [
    `Final value ${formatSi(figures?.finalValue, '')}`,
    `rise from 10 % to 90 % in ${formatSi(figures?.riseTimeS, 's')}`,
    `overshoot ${formatPercent(figures?.overshootPercent)}`,
    `within 2 % after ${formatSi(figures?.settlingTimeS, 's')}`,
  ];
  const impulse = response.impulses.length > 0 ? ' An impulse at the onset is not drawn.' : '';
  return { timeS, values: timeS.map(response.at), words: `${parts.join(', ')}.${impulse}` };
}

function signalCourse(series: FourierSeries, chain: readonly TransferFunction[]): Course {
  const transient = periodicTransient(series, chain);
  if (!transient.isDefined) throw new AnalysisInputError(transient.reason);
  const { settledAfterS, settledAfterCycles } = transient;
  const cycles = Math.min(20, Math.max(2, Math.ceil((settledAfterCycles ?? 10) * 1.3)));
  const timeS = evenly(cycles / series.frequencyHz);
  return {
    timeS,
    values: timeS.map(transient.at),

    words:
      settledAfterS === null
        ? 'When the output has settled could not be found.'
        : `Within 1 % of the peak of the steady state after ${formatSi(settledAfterS, 's')}, ${formatFixed(settledAfterCycles, 2)} cycles.`,
  };
}

function TransientCurves({ onset }: { onset: Onset }) {
  const course = useCourse(onset);
  const unit = useDraftPart((draft) => draft.outputUnit);
  if (!course) return null;
  if ('problem' in course) return <Text fontSize="13px">{course.problem}</Text>;
  const { timeS, values } = course;
  const shown = onset === 'step' ? '' : unit;
  return (
    <>
      <CurveChart
        label="Output until the steady state"
        height={210}
        hasAxes
        x={linearAxis([0, timeS.at(-1)!], 's', 0)}
        y={linearAxis(extent(values, [0]), shown)}
        curves={[{ x: timeS, y: values, tone: 'ink' }]}
        readout={{ x: timeS, at: (i) => `${formatSi(timeS[i], 's')}: ${formatSi(values[i], shown)}` }}
      />
      <Text fontSize="13px" color="inkSoft">
        {course.words}
      </Text>
    </>
  );
}

function TransientTable({ onset }: { onset: Onset }) {
  const course = useCourse(onset);
  const unit = useDraftPart((draft) => draft.outputUnit);
  if (!course || 'problem' in course) return null;
  const shown = onset === 'step' ? '' : unit;
  return (
    <TableTwin
      caption="Output until the steady state"
      columns={[
        {
          key: 'time',
          header: 'Time',
          fileHeader: 'Time (s)',
          align: 'right',
          value: (i: number) => course.timeS[i]!,
          show: (i) => formatSi(course.timeS[i], 's'),
        },
        {
          key: 'value',
          header: 'Output',
          fileHeader: shown ? `Output (${shown})` : 'Output',
          align: 'right',
          value: (i: number) => course.values[i]!,
          show: (i) => formatSi(course.values[i], shown),
        },
      ]}
      rows={course.timeS.map((_, i) => i)}
      rowKey={(i) => i}
      fileName="transient"
      maxHeight="320px"
    />
  );
}
