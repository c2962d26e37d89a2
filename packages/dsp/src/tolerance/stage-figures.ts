import { chainOf, type StageSpec } from '../circuits/stage-spec.js';
import { AnalysisInputError } from '../errors.js';
import type { FourierSeries } from '../fourier/types.js';
import { complexAbs } from '../linear/complex.js';
import { responseOf } from '../transfer/frequency-response.js';
import { stability } from '../transfer/stability.js';
import type { ComponentSpread, Figures } from './spread.js';

/** A value of one of the stages. */
export interface StageValue {
  /** From 0. */
  stage: number;
  /** Name of the parameter of a stage that values describe. */
  parameter: string;
}

/** Spread of a value of one of the stages about the value that it has. */
export type StageSpread = StageValue & Pick<ComponentSpread, 'tolerancePercent' | 'distribution'>;

/**
 * The spreads of values of stages, ready for `cornerStudy` and `drawStudy`.
 *
 * @throws AnalysisInputError when a stage has no such value
 */
export function spreadsOf(specs: readonly StageSpec[], spreads: readonly StageSpread[]): ComponentSpread[] {
  return spreads.map(({ tolerancePercent, distribution, ...at }) => ({
    name: `Stage ${at.stage + 1}: ${at.parameter}`,
    nominal: valueOf(specs, at),
    tolerancePercent,
    ...(distribution && { distribution }),
  }));
}

/**
 * Stages with some of their values replaced.
 *
 * @param values by the places they belong to
 * @throws AnalysisInputError when a stage has no such value
 */
export function withValues(
  specs: readonly StageSpec[],
  places: readonly StageValue[],
  values: ArrayLike<number>,
): StageSpec[] {
  const out = [...specs];
  places.forEach((place, i) => {
    valueOf(specs, place);
    const spec = out[place.stage]!;
    if (spec.kind !== 'circuit') return;
    out[place.stage] = { ...spec, values: { ...spec.values, [place.parameter]: values[i]! } };
  });
  return out;
}

/**
 * Figures of stages in series as functions of some of their values: first the rms of each order of the input behind them,
 * then the gain at each of the frequencies. NaN where the stages are not stable.
 */
export function stageFigures(
  specs: readonly StageSpec[],
  places: readonly StageValue[],
  input: FourierSeries,
  frequenciesHz: readonly number[] = [],
): Figures {
  const at = [...input.components.map(({ order }) => order * input.frequencyHz), ...frequenciesHz];
  const scale = [...input.components.map(({ rms }) => rms), ...frequenciesHz.map(() => 1)];
  const out = new Float64Array(at.length);
  return (values) => {
    const chain = chainOf(withValues(specs, places, values));
    if (stability(chain).verdict !== 'stable') return out.fill(NaN);
    const response = responseOf(chain);
    // A stable stage has a finite response at every frequency.
    for (let k = 0; k < at.length; k++) out[k] = scale[k]! * complexAbs(response(at[k]!)!);
    return out;
  };
}

function valueOf(specs: readonly StageSpec[], { stage, parameter }: StageValue): number {
  const spec = specs[stage];
  if (spec === undefined) {
    throw new AnalysisInputError(`There is no stage ${stage + 1}; there are ${specs.length}.`);
  }
  const value = spec.kind === 'circuit' ? spec.values[parameter] : undefined;
  if (value === undefined) {
    throw new AnalysisInputError(
      `Stage ${stage + 1} has no value "${parameter}" that could vary; only stages made of components have such values.`,
    );
  }
  return value;
}
