import { AnalysisInputError } from '../errors.js';
import type { Complex } from '../linear/complex.js';
import { closeLoop, type LoopOutput } from '../transfer/close-loop.js';
import { transferFunction, type TransferFunction } from '../transfer/transfer-function.js';
import { fromZerosPolesGain } from '../transfer/zeros-poles-gain.js';
import { checkValues, type CircuitKind, type CircuitValues } from './circuit-kind.js';
import { pidController, type ControllerSettings } from './controller.js';
import { passiveStages } from './passive-stages.js';
import { shuntFilters } from './shunt-filters.js';
import { standardForms } from './standard-forms.js';

const kinds = { ...standardForms, ...passiveStages, ...shuntFilters };

/** Names of the kinds of stages that values of parameters describe. */
export type CircuitName = keyof typeof kinds;

/** All kinds of stages with their parameters, for forms and for checking. */
export const circuitKinds: Readonly<Record<CircuitName, CircuitKind>> = kinds;

export function isCircuitName(name: string): name is CircuitName {
  return Object.hasOwn(kinds, name);
}

/** A stage as plain data, as it is entered and stored. */
export type StageSpec =
  | {
      kind: 'coefficients';
      /** Descending powers of s. */
      numerator: readonly number[];
      denominator: readonly number[];
      delayS?: number | undefined;
    }
  | {
      kind: 'zeros-poles-gain';
      /** In 1/s. */
      zeros: readonly Complex[];
      poles: readonly Complex[];
      gain: number;
      delayS?: number | undefined;
    }
  | {
      kind: 'circuit';
      /** One of `circuitKinds`; another is refused. */
      circuit: string;
      values: CircuitValues;
    }
  | {
      kind: 'closed-loop';
      controller: ControllerSettings;
      /** Stages of the plant in series. */
      plant: readonly StageSpec[];
      output: LoopOutput;
      /** Order of the Padé approximant for delays of the plant. */
      padeOrder?: number | undefined;
    };

/**
 * Transfer function of a stage.
 *
 * @throws AnalysisInputError that names the value at fault and what it must be
 */
export function stageTransfer(spec: StageSpec): TransferFunction {
  switch (spec.kind) {
    case 'coefficients':
      return transferFunction(spec.numerator, spec.denominator, spec.delayS);
    case 'zeros-poles-gain':
      return fromZerosPolesGain(spec, spec.delayS);
    case 'circuit': {
      if (!isCircuitName(spec.circuit)) {
        throw new AnalysisInputError(
          `There is no kind of stage "${spec.circuit}"; there are ${Object.keys(kinds).join(', ')}.`,
        );
      }
      const kind = circuitKinds[spec.circuit];
      return kind.transfer(checkValues(kind, spec.values, `The stage "${spec.circuit}"`));
    }
    case 'closed-loop':
      return closeLoop(pidController(spec.controller), chainOf(spec.plant), spec.output, spec.padeOrder);
  }
}

/**
 * Transfer functions of stages in series.
 *
 * @throws AnalysisInputError with the number of the stage in front
 */
export function chainOf(specs: readonly StageSpec[]): TransferFunction[] {
  return specs.map((spec, i) => {
    try {
      return stageTransfer(spec);
    } catch (error) {
      if (!(error instanceof AnalysisInputError)) throw error;
      throw new AnalysisInputError(`Stage ${i + 1}: ${error.message}`);
    }
  });
}
