import type { StudyDefinition, StudyStage } from '@overtally/contracts';
import { AnalysisInputError, stageTransfer, type StageSpec, type TransferFunction } from '@overtally/dsp';
import type { FieldError } from '../../common/problem.js';

/** A study that cannot be worked out, and where it fails. */
export class StudyFault extends Error {
  override readonly name = 'StudyFault';

  constructor(readonly errors: FieldError[]) {
    super(errors.map(({ path, message }) => `${path}: ${message}`).join(' '));
  }
}

/** A stage that is on, with its place among all. */
interface StageOn {
  stage: StudyStage;
  index: number;
}

/** The stages that are on; the others let everything through. */
export const stagesOn = ({ stages }: Pick<StudyDefinition, 'stages'>): StageOn[] =>
  stages.map((stage, index) => ({ stage, index })).filter(({ stage }) => stage.isOn);

/**
 * Transfer functions of the stages that are on.
 * @throws StudyFault naming every stage at fault by its place, with the value where it is one
 */
export function chainOfStudy(definition: Pick<StudyDefinition, 'stages'>): TransferFunction[] {
  const errors: FieldError[] = [];
  const chain = stagesOn(definition).flatMap(({ stage, index }) => {
    const made = transferOf(stage.spec, `definition.stages.${index}.spec`);
    if (!('path' in made)) return [made];
    errors.push(made);
    return [];
  });
  if (errors.length > 0) throw new StudyFault(errors);
  return chain;
}

function transferOf(spec: StageSpec, path: string): TransferFunction | FieldError {
  if (spec.kind === 'closed-loop') {
    for (const [index, plant] of spec.plant.entries()) {
      const made = transferOf(plant, `${path}.plant.${index}`);
      if ('path' in made) return made;
    }
  }
  try {
    return stageTransfer(spec);
  } catch (error) {
    if (!(error instanceof AnalysisInputError)) throw error;
    return {
      path: error.value === undefined ? path : `${path}.values.${error.value}`,
      message: error.message,
    };
  }
}
