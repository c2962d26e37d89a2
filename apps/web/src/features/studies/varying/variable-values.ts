import type { StudyStage } from '@overtally/contracts';
import { circuitKinds, type CircuitParameter, type StageSpread } from '@overtally/dsp';
import { circuitOf, stageName } from '../stages/stage-words.js';

/** A value of a stage that can vary. */
export interface VariableValue {
  /** Index among all stages of the draft. */
  stage: number;
  /** Index among those that are on. */
  place: number;
  parameter: CircuitParameter;
  value: number;
  /** "2. Notch: Q" */
  label: string;
}

/** Values of the stages that are on and made of components or figures. */
export function variableValues(stages: readonly StudyStage[]): VariableValue[] {
  let place = -1;
  return stages.flatMap((stage, index) => {
    if (!stage.isOn) return [];
    place++;
    const circuit = circuitOf(stage.spec);
    if (circuit === null || stage.spec.kind !== 'circuit') return [];
    const { values } = stage.spec;
    const at = place;
    return circuitKinds[circuit].parameters.flatMap((parameter) => {
      const value = values[parameter.name];
      if (value === undefined) return [];
      const label = `${index + 1}. ${stageName(stage)}: ${parameter.symbol}`;
      return [{ stage: index, place: at, parameter, value, label }];
    });
  });
}

/** Tolerances of the values that have one, by their place among the stages that are on. */
export function spreadPlaces(stages: readonly StudyStage[]): StageSpread[] {
  return variableValues(stages).flatMap(({ stage, place, parameter }) => {
    const found = stages[stage]!.tolerances.find((each) => each.parameter === parameter.name);
    if (!found || found.tolerancePercent === 0) return [];
    const { tolerancePercent, distribution } = found;
    return [
      { stage: place, parameter: parameter.name, tolerancePercent, ...(distribution && { distribution }) },
    ];
  });
}

/** A stage with another tolerance of one value; 0 takes it away. */
export function withTolerance<S extends StudyStage>(
  stage: S,
  parameter: string,
  change: Partial<StudyStage['tolerances'][number]>,
): S {
  const held = stage.tolerances.find((each) => each.parameter === parameter);
  const next = { tolerancePercent: 0, ...held, parameter, ...change };
  const others = stage.tolerances.filter((each) => each.parameter !== parameter);
  return { ...stage, tolerances: next.tolerancePercent > 0 ? [...others, next] : others };
}
