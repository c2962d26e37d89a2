import { AnalysisInputError } from '../errors.js';
import { transferFunction } from '../transfer/transfer-function.js';
import { ABSENT, NONE, parameter, type CheckedValues, type CircuitKind } from './circuit-kind.js';
import { ladderTransfer, seriesImpedance, type LadderElement, type SeriesBranch } from './impedance.js';
import { lineReactorInductance } from './line-reactor.js';

const resistance = parameter.resistance('resistanceOhm', 'R', 'resistance');
const inductance = parameter.inductance('inductanceH', 'L', 'inductance in series');
const capacitance = parameter.capacitance('capacitanceF', 'C', 'capacitance');
const coil = parameter.resistance('coilResistanceOhm', 'RL', 'resistance of the coil', NONE);
const load = parameter.resistance(
  'loadResistanceOhm',
  'RLoad',
  'load across the output, none if left out',
  ABSENT,
);
const neededLoad = parameter.resistance('loadResistanceOhm', 'RLoad', 'load across the output');

const branch = [
  parameter.resistance('resistanceOhm', 'R', 'resistance', NONE),
  parameter.inductance('inductanceH', 'L', 'inductance', NONE),
  parameter.capacitance('capacitanceF', 'C', 'capacitance in series, none if left out', ABSENT),
];

/**
 * Passive two-ports, from the voltage of a source without impedance to the voltage across the load, and plain impedances.
 */
export const passiveStages = {
  'rc-low-pass': {
    meaning: 'voltage across C, behind R in series',
    parameters: [resistance, capacitance, load],
    transfer: (v) =>
      ladderTransfer([series({ resistanceOhm: v.of('resistanceOhm') }), shuntCapacitor(v), ...loadOf(v)]),
  },
  'rc-high-pass': {
    meaning: 'voltage across R, behind C in series',
    parameters: [resistance, capacitance, load],
    transfer: (v) =>
      ladderTransfer([
        series({ capacitanceF: v.of('capacitanceF') }),
        shunt({ resistanceOhm: v.of('resistanceOhm') }),
        ...loadOf(v),
      ]),
  },
  'rl-low-pass': {
    meaning: 'voltage across R, behind L in series',
    parameters: [resistance, inductance, coil, load],
    transfer: (v) =>
      ladderTransfer([seriesCoil(v), shunt({ resistanceOhm: v.of('resistanceOhm') }), ...loadOf(v)]),
  },
  'rl-high-pass': {
    meaning: 'voltage across L with its resistance, behind R in series',
    parameters: [resistance, inductance, coil, load],
    transfer: (v) =>
      ladderTransfer([
        series({ resistanceOhm: v.of('resistanceOhm') }),
        shunt({ inductanceH: v.of('inductanceH'), resistanceOhm: v.of('coilResistanceOhm') }),
        ...loadOf(v),
      ]),
  },
  'lc-low-pass': {
    meaning: 'voltage across C, behind L in series',
    parameters: [inductance, capacitance, coil, load],
    transfer: (v) => ladderTransfer([seriesCoil(v), shuntCapacitor(v), ...loadOf(v)]),
  },
  'damped-lc-low-pass': {
    meaning: 'voltage across C and the damping branch of Rd and Cd in series, behind L in series',
    parameters: [
      ...[inductance, capacitance, coil],
      parameter.resistance('dampingResistanceOhm', 'Rd', 'resistance of the damping branch'),
      parameter.capacitance('dampingCapacitanceF', 'Cd', 'capacitance that keeps DC off Rd'),
      load,
    ],
    transfer: (v) =>
      ladderTransfer([
        seriesCoil(v),
        shuntCapacitor(v),
        shunt({ resistanceOhm: v.of('dampingResistanceOhm'), capacitanceF: v.of('dampingCapacitanceF') }),
        ...loadOf(v),
      ]),
  },
  'series-trap': {
    meaning: 'voltage across a branch of R, L and C in series, behind a resistance in series',
    parameters: [
      parameter.resistance('sourceResistanceOhm', 'Rs', 'resistance in series'),
      parameter.inductance('inductanceH', 'L', 'inductance of the branch'),
      parameter.capacitance('capacitanceF', 'C', 'capacitance of the branch'),
      coil,
      load,
    ],
    transfer: (v) =>
      ladderTransfer([
        series({ resistanceOhm: v.of('sourceResistanceOhm') }),
        shunt({
          resistanceOhm: v.of('coilResistanceOhm'),
          inductanceH: v.of('inductanceH'),
          capacitanceF: v.of('capacitanceF'),
        }),
        ...loadOf(v),
      ]),
  },
  'line-reactor': {
    meaning:
      'voltage of each harmonic at the load over that of the source, behind a reactor in series with the source impedance',
    parameters: [
      parameter.of(
        'impedancePercent',
        'uk',
        '%',
        'reactance at rated frequency in percent of the rated impedance',
      ),
      parameter.of('ratedVoltageV', 'Un', 'V', 'rated voltage between lines'),
      parameter.of('ratedCurrentA', 'In', 'A', 'rated current'),
      parameter.frequency('ratedFrequencyHz', 'fn', 'rated frequency'),
      coil,
      parameter.inductance('sourceInductanceH', 'Ls', 'inductance of the source, one phase', NONE),
      parameter.resistance('sourceResistanceOhm', 'Rs', 'resistance of the source, one phase', NONE),
      neededLoad,
      parameter.capacitance(
        'loadCapacitanceF',
        'CLoad',
        'capacitance across the load, none if left out',
        ABSENT,
      ),
    ],
    transfer: (v) => {
      const capacitanceF = v.maybe('loadCapacitanceF');
      return ladderTransfer([
        series({ inductanceH: v.of('sourceInductanceH'), resistanceOhm: v.of('sourceResistanceOhm') }),
        series({ inductanceH: reactorOf(v), resistanceOhm: v.of('coilResistanceOhm') }),
        ...(capacitanceF === undefined ? [] : [shunt({ capacitanceF })]),
        ...loadOf(v),
      ]);
    },
  },
  'series-impedance': {
    meaning: 'voltage across R, L and C in series over the current through them, V/A',
    parameters: branch,
    // Improper with L: behind a shunt filter it gives the voltage at the bus from the current in the supply.
    transfer: (v) => {
      const { numerator, denominator } = seriesImpedance(branchOf(v));
      return transferFunction(numerator, denominator);
    },
  },
  'series-admittance': {
    meaning: 'current through R, L and C in series over the voltage across them, A/V',
    parameters: branch,
    transfer: (v) => {
      const { numerator, denominator } = seriesImpedance(branchOf(v));
      if (numerator.every((c) => c === 0)) {
        throw new AnalysisInputError(
          'A branch without R, L and C is a short circuit; give at least one of them.',
        );
      }
      return transferFunction(denominator, numerator);
    },
  },
  transformer: {
    meaning: 'voltage at the load on the secondary over the voltage at the primary',
    parameters: [
      parameter.plain('turnsRatio', 'n', 'turns of the primary over those of the secondary'),
      parameter.inductance('primaryLeakageH', 'L1', 'leakage inductance of the primary', NONE),
      parameter.resistance('primaryResistanceOhm', 'R1', 'resistance in front of the magnetising inductance'),
      parameter.inductance('magnetisingH', 'Lm', 'magnetising inductance, seen from the primary', ABSENT),
      parameter.inductance('secondaryLeakageH', 'L2', 'leakage inductance of the secondary', NONE),
      parameter.resistance('secondaryResistanceOhm', 'R2', 'resistance of the secondary', NONE),
      neededLoad,
      parameter.capacitance(
        'loadCapacitanceF',
        'CLoad',
        'capacitance across the load, none if left out',
        ABSENT,
      ),
    ],
    // Everything seen from the primary: impedances of the secondary times n².
    transfer: (v) => {
      const n = v.of('turnsRatio');
      const capacitanceF = v.maybe('loadCapacitanceF');
      const magnetisingH = v.maybe('magnetisingH');
      const { numerator, denominator } = ladderTransfer([
        series({ inductanceH: v.of('primaryLeakageH'), resistanceOhm: v.of('primaryResistanceOhm') }),
        ...(magnetisingH === undefined ? [] : [shunt({ inductanceH: magnetisingH })]),
        series({
          inductanceH: n ** 2 * v.of('secondaryLeakageH'),
          resistanceOhm: n ** 2 * v.of('secondaryResistanceOhm'),
        }),
        ...(capacitanceF === undefined ? [] : [shunt({ capacitanceF: capacitanceF / n ** 2 })]),
        shunt({ resistanceOhm: n ** 2 * v.of('loadResistanceOhm') }),
      ]);
      return { numerator: numerator.map((c) => c / n), denominator };
    },
  },
} satisfies Record<string, CircuitKind>;

function reactorOf(v: CheckedValues): number {
  return lineReactorInductance({
    impedancePercent: v.of('impedancePercent'),
    ratedVoltageV: v.of('ratedVoltageV'),
    ratedCurrentA: v.of('ratedCurrentA'),
    ratedFrequencyHz: v.of('ratedFrequencyHz'),
  });
}

function branchOf(v: CheckedValues): SeriesBranch {
  return {
    resistanceOhm: v.of('resistanceOhm'),
    inductanceH: v.of('inductanceH'),
    capacitanceF: v.maybe('capacitanceF'),
  };
}

function series(branch: SeriesBranch): LadderElement {
  return { series: seriesImpedance(branch) };
}

function shunt(branch: SeriesBranch): LadderElement {
  return { shunt: seriesImpedance(branch) };
}

function seriesCoil(v: CheckedValues): LadderElement {
  return series({ inductanceH: v.of('inductanceH'), resistanceOhm: v.of('coilResistanceOhm') });
}

function shuntCapacitor(v: CheckedValues): LadderElement {
  return shunt({ capacitanceF: v.of('capacitanceF') });
}

function loadOf(v: CheckedValues): LadderElement[] {
  const resistanceOhm = v.maybe('loadResistanceOhm');
  return resistanceOhm === undefined ? [] : [shunt({ resistanceOhm })];
}
