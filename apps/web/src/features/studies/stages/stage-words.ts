import type { StudyStage } from '@overtally/contracts';
import { circuitKinds, type CircuitName } from '@overtally/dsp';

export type StageKind = CircuitName | 'coefficients' | 'zeros-poles-gain' | 'closed-loop';

/** What is offered under one heading. */
interface StageGroup {
  label: string;
  kinds: readonly StageKind[];
}

export const stageGroups: readonly StageGroup[] = [
  {
    label: 'At a bus with a supply behind it',
    kinds: [
      'shunt-capacitor',
      'single-tuned-filter',
      'high-pass-filter',
      'c-type-filter',
      'line-reactor-at-converter',
      'current-divider',
    ],
  },
  {
    label: 'Between a source and its load',
    kinds: [
      'lc-low-pass',
      'damped-lc-low-pass',
      'line-reactor',
      'transformer',
      'series-trap',
      'rc-low-pass',
      'rc-high-pass',
      'rl-low-pass',
      'rl-high-pass',
    ],
  },
  { label: 'Current into voltage and back', kinds: ['series-impedance', 'series-admittance'] },
  {
    label: 'By its figures',
    kinds: [
      'gain',
      'delay',
      'notch',
      'first-order-low-pass',
      'first-order-high-pass',
      'second-order-low-pass',
      'second-order-high-pass',
      'second-order-band-pass',
      'integrator',
    ],
  },
  { label: 'By its transfer function', kinds: ['coefficients', 'zeros-poles-gain', 'closed-loop'] },
];

export const stageWords: Record<StageKind, string> = {
  'shunt-capacitor': 'Capacitor at the bus',
  'single-tuned-filter': 'Single-tuned filter at the bus',
  'high-pass-filter': 'Second-order high-pass filter at the bus',
  'c-type-filter': 'C-type filter at the bus',
  'line-reactor-at-converter': 'Line reactor at a converter',
  'current-divider': 'Two branches that share a current',
  'lc-low-pass': 'LC low-pass',
  'damped-lc-low-pass': 'LC low-pass with damping branch',
  'line-reactor': 'Line reactor in front of a load',
  transformer: 'Transformer with leakage',
  'series-trap': 'Trap of R, L and C across the load',
  'rc-low-pass': 'RC low-pass',
  'rc-high-pass': 'RC high-pass',
  'rl-low-pass': 'RL low-pass',
  'rl-high-pass': 'RL high-pass',
  'series-impedance': 'Impedance: current in, voltage out',
  'series-admittance': 'Admittance: voltage in, current out',
  gain: 'Gain',
  delay: 'Delay',
  notch: 'Notch',
  'first-order-low-pass': 'Low-pass of first order',
  'first-order-high-pass': 'High-pass of first order',
  'second-order-low-pass': 'Low-pass of second order',
  'second-order-high-pass': 'High-pass of second order',
  'second-order-band-pass': 'Band-pass of second order',
  integrator: 'Integrator',
  coefficients: 'Coefficients of s',
  'zeros-poles-gain': 'Zeros, poles and gain',
  'closed-loop': 'Closed loop',
};

const supply = { sourceInductanceH: 0.3e-3, sourceResistanceOhm: 0.03 };
const reactor = { impedancePercent: 4, ratedVoltageV: 400, ratedCurrentA: 16, ratedFrequencyHz: 50 };

/** Values that a new stage begins with: plausible at 50 Hz, 400 V and some kW, to be changed. */
const starts: Record<CircuitName, Record<string, number>> = {
  'shunt-capacitor': { capacitanceF: 100e-6, ...supply },
  'single-tuned-filter': { capacitanceF: 100e-6, inductanceH: 4.5e-3, coilResistanceOhm: 0.05, ...supply },
  'high-pass-filter': {
    ...{ capacitanceF: 100e-6, inductanceH: 1e-3, coilResistanceOhm: 0.02, dampingResistanceOhm: 5 },
    ...supply,
  },
  'c-type-filter': {
    ...{ capacitanceF: 100e-6, auxiliaryCapacitanceF: 2.25e-3, inductanceH: 4.5e-3 },
    ...{ coilResistanceOhm: 0.05, dampingResistanceOhm: 20 },
    ...supply,
  },
  'line-reactor-at-converter': { ...reactor, ...supply },
  'current-divider': {
    ...{ branchResistanceOhm: 0.1, branchInductanceH: 1e-3 },
    ...{ otherResistanceOhm: 0.1, otherInductanceH: 1e-3 },
  },
  'lc-low-pass': { inductanceH: 1e-3, capacitanceF: 10e-6, coilResistanceOhm: 0.1, loadResistanceOhm: 50 },
  'damped-lc-low-pass': {
    ...{ inductanceH: 1e-3, capacitanceF: 10e-6, coilResistanceOhm: 0.1 },
    ...{ dampingResistanceOhm: 10, dampingCapacitanceF: 40e-6 },
  },
  'line-reactor': { ...reactor, loadResistanceOhm: 14.4 },
  transformer: {
    turnsRatio: 1,
    primaryResistanceOhm: 0.1,
    secondaryResistanceOhm: 0.1,
    loadResistanceOhm: 50,
  },
  'series-trap': {
    sourceResistanceOhm: 1,
    inductanceH: 4.5e-3,
    capacitanceF: 100e-6,
    coilResistanceOhm: 0.05,
  },
  'rc-low-pass': { resistanceOhm: 1000, capacitanceF: 1e-6 },
  'rc-high-pass': { resistanceOhm: 1000, capacitanceF: 1e-6 },
  'rl-low-pass': { resistanceOhm: 10, inductanceH: 10e-3 },
  'rl-high-pass': { resistanceOhm: 10, inductanceH: 10e-3 },
  'series-impedance': { resistanceOhm: 0.05, inductanceH: 0.3e-3 },
  'series-admittance': { resistanceOhm: 10, inductanceH: 10e-3 },
  gain: { gain: 1 },
  delay: { delayS: 1e-3 },
  notch: { notchFrequencyHz: 150, quality: 5, floor: 0 },
  'first-order-low-pass': { timeConstantS: 1e-3 },
  'first-order-high-pass': { timeConstantS: 1e-3 },
  'second-order-low-pass': { naturalFrequencyHz: 500, dampingRatio: 0.7 },
  'second-order-high-pass': { naturalFrequencyHz: 500, dampingRatio: 0.7 },
  'second-order-band-pass': { naturalFrequencyHz: 250, dampingRatio: 0.1 },
  integrator: { gain: 1 },
};

/** A spec of a kind with the values that it begins with. */
export function startingSpec(kind: StageKind): StudyStage['spec'] {
  switch (kind) {
    case 'coefficients':
      return { kind, numerator: [1], denominator: [1e-3, 1] };
    case 'zeros-poles-gain':
      return { kind, zeros: [], poles: [{ re: -1000, im: 0 }], gain: 1000 };
    case 'closed-loop':
      return {
        kind,
        controller: { gain: 2, integralTimeS: 0.01 },
        plant: [{ kind: 'circuit', circuit: 'first-order-low-pass', values: { timeConstantS: 0.01 } }],
        output: 'reference-to-output',
      };
    default:
      return { kind: 'circuit', circuit: kind, values: { ...starts[kind] } };
  }
}

export const newStage = (kind: StageKind): StudyStage => ({
  name: '',
  isOn: true,
  spec: startingSpec(kind),
  tolerances: [],
});

/** A circuit by its name, where it is one that is known here. */
export function circuitOf(spec: StudyStage['spec']): CircuitName | null {
  return spec.kind === 'circuit' && Object.hasOwn(circuitKinds, spec.circuit)
    ? (spec.circuit as CircuitName)
    : null;
}

/** Kind of a spec in words. */
export function kindWords(spec: StudyStage['spec']): string {
  if (spec.kind !== 'circuit') return stageWords[spec.kind];
  const circuit = circuitOf(spec);
  return circuit === null ? spec.circuit : stageWords[circuit];
}

/** Name of a stage on the page: its own, or that of its kind. */
export const stageName = (stage: Pick<StudyStage, 'name' | 'spec'>): string =>
  stage.name || kindWords(stage.spec);

/** What the output of a stage is over its input. */
export function stageMeaning(spec: StudyStage['spec']): string {
  if (spec.kind === 'closed-loop') return loopWords[spec.output];
  const circuit = circuitOf(spec);
  return circuit === null ? 'output over input, as its coefficients say' : circuitKinds[circuit].meaning;
}

export type LoopOutput = Extract<StudyStage['spec'], { kind: 'closed-loop' }>['output'];

export const loopWords: Record<LoopOutput, string> = {
  'reference-to-output': 'output of the loop over its reference, CG/(1 + CG)',
  'reference-to-error': 'error of the loop over its reference, 1/(1 + CG)',
  'disturbance-to-output': 'output over a disturbance in front of the plant, G/(1 + CG)',
};
