import type { LimitSet, StudyDefinition, StudyResult, StudySeries } from '@overtally/contracts';
import {
  AnalysisInputError,
  cornerStudy,
  drawStudy,
  spreadsOf,
  stageFigures,
  worstOrder,
  type Figures,
  type StageSpread,
} from '@overtally/dsp';
import { evaluate, measurementOfSeries } from '@overtally/limits';
import { stagesOn, StudyFault } from './stage-chain.js';

/** Draws times orders that are held in memory at once: some 16 MB. */
const MAX_VALUES = 2_000_000;

type Spread = NonNullable<StudyResult['spread']>;

interface Judge {
  limitSet: LimitSet;
  judgement: NonNullable<StudyDefinition['judgement']>;
}

/**
 * What the tolerances of the stages make of the orders: all corners or seeded draws, each judged by itself where there are
 * limits on the output; a pass on a condition counts as a pass.
 *
 * @param judge null where the output is not judged
 * @param limits limit of each order of the series, for the worst of them
 * @param between called before each set of values; may throw to stop
 * @throws StudyFault for tolerances of values that cannot vary, or too many of them
 */
export function spreadOfStudy(
  definition: StudyDefinition,
  series: StudySeries,
  {
    judge,
    limits,
    between,
  }: { judge: Judge | null; limits: readonly (number | null)[]; between: () => void },
): Spread | null {
  const { spread } = definition;
  if (spread === null) return null;
  const on = stagesOn(definition);
  const places: StageSpread[] = on.flatMap(({ stage }, at) =>
    stage.tolerances.map(({ parameter, tolerancePercent, distribution }) => ({
      ...{ stage: at, parameter, tolerancePercent },
      ...(distribution && { distribution }),
    })),
  );
  const orders = series.components.map(({ order }) => order);
  if (spread.method === 'draws' && spread.draws * orders.length > MAX_VALUES) {
    const most = Math.floor(MAX_VALUES / orders.length);
    const message = `With ${orders.length} orders at most ${most} draws are made; take fewer draws or orders`;
    throw new StudyFault([{ path: 'definition.spread.draws', message }]);
  }
  const specs = on.map(({ stage }) => stage.spec);
  const gainAtZero = orders.length;
  const figures = fault('definition.stages', () => stageFigures(specs, places, series, [0]));
  const passes = (values: ArrayLike<number>) =>
    judge !== null && isMet(judge, behind(series, values, gainAtZero), definition);
  let sets = 0;
  let passing = 0;
  const counted: Figures = (values) => {
    between();
    const found = figures(values);
    // The first set of values is the nominal one, which is no corner and no draw.
    if (sets++ > 0 && passes(found)) passing++;
    return found;
  };
  const ranges = fault('definition.stages', () => {
    const spreads = spreadsOf(specs, places);
    if (spread.method === 'corners') return cornerStudy(spreads, counted).figures;
    return drawStudy(spreads, counted, { draws: spread.draws, seed: spread.seed }).figures;
  }).slice(0, orders.length);
  const worst = worstOrder(
    ranges.map(({ max }) => max),
    limits,
  );
  return {
    sharePassing: judge === null ? null : passing / (sets - 1),
    worstOrder: worst === null ? null : orders[worst.index]!,
    orders: ranges.flatMap(({ min, max }, at) =>
      min === null || max === null || Number.isNaN(min) ? [] : [{ order: orders[at]!, min, max }],
    ),
  };
}

function behind(series: StudySeries, figures: ArrayLike<number>, gainAtZero: number): StudySeries | null {
  if (Number.isNaN(figures[0])) return null;
  const { frequencyHz, dc, components } = series;
  return {
    ...{ frequencyHz, dc: dc * figures[gainAtZero]! },
    components: components.map(({ order }, at) => ({ order, rms: figures[at]!, phaseDeg: null })),
  };
}

/** Where there is no steady state, nothing is met. */
function isMet(
  { limitSet, judgement }: Judge,
  series: StudySeries | null,
  { outputQuantity, outputUnit }: StudyDefinition,
): boolean {
  if (series === null) return false;
  const { result } = evaluate(limitSet, measurementOfSeries(series, outputQuantity, outputUnit), judgement);
  return result === 'pass' || result === 'conditional-pass';
}

function fault<T>(path: string, compute: () => T): T {
  try {
    return compute();
  } catch (error) {
    if (error instanceof AnalysisInputError) throw new StudyFault([{ path, message: error.message }]);
    throw error;
  }
}
