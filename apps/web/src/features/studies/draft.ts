import type { Quantity, StudyDefinition, StudyStage } from '@overtally/contracts';
import type { FourierSeries, StageSpec } from '@overtally/dsp';

/** A stage while it is edited; the key holds its place on the page when it moves. */
export interface DraftStage extends StudyStage {
  key: number;
}

/** A study while it is edited: its definition with the harmonics that it starts from. */
export interface StudyDraft extends Omit<StudyDefinition, 'stages'> {
  stages: DraftStage[];
  series: FourierSeries;
}

let lastKey = 0;
export const withKey = (stage: StudyStage): DraftStage => ({ ...stage, key: ++lastKey });

export const draftOf = (definition: StudyDefinition, series: FourierSeries): StudyDraft => ({
  ...definition,
  stages: definition.stages.map(withKey),
  series,
});

/** What is stored of a draft. */
export function definitionOf({ series: _series, stages, ...rest }: StudyDraft): StudyDefinition {
  return { ...rest, stages: stages.map(({ key: _key, ...stage }) => stage) };
}

/** The description of a stage as packages/dsp takes it, which checks the name of a circuit itself. */
export const specOf = ({ spec }: Pick<StudyStage, 'spec'>): StageSpec => spec;

/** Stages that are on, with their index in the draft. */
export const stagesOn = (stages: readonly StudyStage[]): { stage: StudyStage; index: number }[] =>
  stages.flatMap((stage, index) => (stage.isOn ? [{ stage, index }] : []));

/** A quantity with its unit. */
export interface Physical {
  quantity: Quantity;
  unit: string;
}

const baseUnits: Partial<Record<Quantity, string>> = { voltage: 'V', current: 'A' };

/**
 * What stands behind the stages: an impedance makes a voltage of a current, an admittance a current of a voltage; all
 * other stages keep quantity and unit.
 */
export function physicalBehind(input: Physical, stages: readonly StudyStage[]): Physical {
  return stagesOn(stages).reduce<Physical>((physical, { stage: { spec } }) => {
    const quantity =
      spec.kind !== 'circuit'
        ? null
        : spec.circuit === 'series-impedance'
          ? 'voltage'
          : spec.circuit === 'series-admittance'
            ? 'current'
            : null;
    return quantity === null ? physical : { quantity, unit: baseUnits[quantity] ?? '' };
  }, input);
}

/** A draft with other stages; the quantity at the output follows them where they alone decide it. */
export function withStages(draft: StudyDraft, stages: DraftStage[]): StudyDraft {
  const input = { quantity: draft.inputQuantity, unit: draft.inputUnit };
  const was = physicalBehind(input, draft.stages);
  const is = physicalBehind(input, stages);
  const changes = was.quantity !== is.quantity || was.unit !== is.unit;
  return {
    ...draft,
    stages,
    ...(changes && { outputQuantity: is.quantity, outputUnit: is.unit }),
  };
}

/** A draft that starts from something else. */
export function withInput(
  draft: StudyDraft,
  change: Pick<StudyDraft, 'input' | 'series'> & { physical?: Physical },
): StudyDraft {
  const { physical, ...rest } = change;
  const input = physical ?? { quantity: draft.inputQuantity, unit: draft.inputUnit };
  const output = physicalBehind(input, draft.stages);
  return {
    ...draft,
    ...rest,
    ...(physical && {
      inputQuantity: input.quantity,
      inputUnit: input.unit,
      outputQuantity: output.quantity,
      outputUnit: output.unit,
    }),
  };
}

/** What a new study says before anything was chosen. */
export function emptyDefinition(
  input: StudyDefinition['input'],
  { quantity, unit }: Physical,
): StudyDefinition {
  return {
    input,
    ...{ inputQuantity: quantity, inputUnit: unit, outputQuantity: quantity, outputUnit: unit },
    ...{ stages: [], thdMaxOrder: 40, judgement: null, spread: null, assumptions: '' },
    resonance: { bandPercent: 10, minGain: 1.5 },
  };
}
