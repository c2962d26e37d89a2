import type { LimitSet, StudyDefinition, StudyResult, StudySeries } from '@overtally/contracts';
import { AnalysisInputError } from '@overtally/dsp';
import type { FieldError } from '../../common/problem.js';
import { ComputeStopped, type ComputeContext } from '../../jobs/compute-task.js';
import { StudyFault } from './stage-chain.js';
import { resultOfStudy } from './study-result.js';

export interface StudyTaskInput {
  definition: StudyDefinition;
  series: StudySeries;
  limitSet: LimitSet | null;
}

/** The result, or what of the study is at fault: errors lose all but name and message on their way out of a thread. */
export type StudyTaskResult = { result: StudyResult } | { errors: FieldError[] };

/** Works a study out, in a compute thread. */
export function studyTask(
  { definition, series, limitSet }: StudyTaskInput,
  { shouldStop }: Pick<ComputeContext, 'shouldStop'>,
): Promise<StudyTaskResult> {
  const stopWhenAsked = () => {
    if (shouldStop()) throw new ComputeStopped();
  };
  return Promise.resolve().then(() => {
    try {
      const result = resultOfStudy(definition, series, limitSet, stopWhenAsked);
      return hasOnlyNumbers(result) ? { result } : { errors: [outOfRange] };
    } catch (error) {
      if (error instanceof StudyFault) return { errors: error.errors };
      if (error instanceof AnalysisInputError) {
        return { errors: [{ path: 'definition.input', message: error.message }] };
      }
      throw error;
    }
  });
}

const outOfRange: FieldError = {
  path: 'definition.stages',
  message: 'Figures behind the stages are too large for a number; check values and units of stages and input',
};

/** False where a number overflowed. */
function hasOnlyNumbers(value: unknown): boolean {
  if (typeof value === 'number') return Number.isFinite(value);
  if (typeof value !== 'object' || value === null) return true;
  return Object.values(value).every(hasOnlyNumbers);
}
