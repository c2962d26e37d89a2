import { transferFunction, type TransferFunction } from '../transfer/transfer-function.js';
import { parameter, UNITY, type CheckedValues, type CircuitKind } from './circuit-kind.js';

const gain = parameter.plain('gain', 'K', 'gain at DC, or far above the corner of a high-pass', UNITY);
const timeConstant = parameter.time('timeConstantS', 'τ', 'time constant');
const naturalFrequency = parameter.frequency('naturalFrequencyHz', 'f0', 'undamped natural frequency');
const damping = parameter.plain('dampingRatio', 'ζ', 'damping ratio, 1/(2Q)', { range: 'not-negative' });

/**
 * Standard forms of first and second order (any textbook on control, such as Ogata, Modern Control Engineering; the notch as
 * in A. I. Zverev, Handbook of Filter Synthesis), a plain gain and a pure delay.
 */
export const standardForms = {
  gain: {
    meaning: 'output = K · input',
    parameters: [parameter.plain('gain', 'K', 'gain', { range: 'any' })],
    transfer: (v) => transferFunction([v.of('gain')], [1]),
  },
  delay: {
    meaning: 'output = input a time T ago, e^(−sT)',
    parameters: [parameter.time('delayS', 'T', 'delay', { range: 'not-negative' })],
    transfer: (v) => transferFunction([1], [1], v.of('delayS')),
  },
  integrator: {
    meaning: 'K/s',
    parameters: [gain],
    transfer: (v) => transferFunction([v.of('gain')], [1, 0]),
  },
  'first-order-low-pass': {
    meaning: 'K/(1 + sτ)',
    parameters: [gain, timeConstant],
    transfer: (v) => transferFunction([v.of('gain')], [v.of('timeConstantS'), 1]),
  },
  'first-order-high-pass': {
    meaning: 'K sτ/(1 + sτ)',
    parameters: [gain, timeConstant],
    transfer: (v) => transferFunction([v.of('gain') * v.of('timeConstantS'), 0], [v.of('timeConstantS'), 1]),
  },
  'second-order-low-pass': {
    meaning: 'K ω0²/(s² + 2ζω0 s + ω0²)',
    parameters: [gain, naturalFrequency, damping],
    transfer: (v) => secondOrder(v, (omega) => [v.of('gain') * omega ** 2]),
  },
  'second-order-high-pass': {
    meaning: 'K s²/(s² + 2ζω0 s + ω0²)',
    parameters: [gain, naturalFrequency, damping],
    transfer: (v) => secondOrder(v, () => [v.of('gain'), 0, 0]),
  },
  'second-order-band-pass': {
    meaning: 'K 2ζω0 s/(s² + 2ζω0 s + ω0²), K at the centre',
    parameters: [gain, naturalFrequency, damping],
    transfer: (v) => secondOrder(v, (omega) => [v.of('gain') * 2 * v.of('dampingRatio') * omega, 0]),
  },
  notch: {
    meaning: '(s² + d (ωn/Q) s + ωn²)/(s² + (ωn/Q) s + ωn²), gain d at the notch',
    parameters: [
      parameter.frequency('notchFrequencyHz', 'fn', 'frequency of the notch'),
      parameter.plain('quality', 'Q', 'frequency of the notch over its −3 dB width'),
      parameter.plain('floor', 'd', 'gain that is left at the notch', { range: 'not-negative', default: 0 }),
    ],
    transfer: (v) => {
      const omega = 2 * Math.PI * v.of('notchFrequencyHz');
      const width = omega / v.of('quality');
      return transferFunction([1, v.of('floor') * width, omega ** 2], [1, width, omega ** 2]);
    },
  },
} satisfies Record<string, CircuitKind>;

function secondOrder(v: CheckedValues, numerator: (omega: number) => number[]): TransferFunction {
  const omega = 2 * Math.PI * v.of('naturalFrequencyHz');
  return transferFunction(numerator(omega), [1, 2 * v.of('dampingRatio') * omega, omega ** 2]);
}
