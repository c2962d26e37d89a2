import { transferFunction, type TransferFunction } from '../transfer/transfer-function.js';
import { multiplyPolynomials } from '../transfer/polynomial.js';
import { ABSENT, NONE, parameter, type CheckedValues, type CircuitKind } from './circuit-kind.js';
import {
  inParallelWith,
  inSeriesWith,
  ladderTransfer,
  seriesImpedance,
  type Impedance,
  type LadderElement,
  type SeriesBranch,
} from './impedance.js';
import { lineReactorInductance } from './line-reactor.js';

const network = [
  parameter.inductance('sourceInductanceH', 'Ls', 'inductance of the supply, one phase'),
  parameter.resistance('sourceResistanceOhm', 'Rs', 'resistance of the supply, one phase', NONE),
  parameter.resistance('loadResistanceOhm', 'RLoad', 'load beside the filter, none if left out', ABSENT),
  parameter.inductance('loadInductanceH', 'LLoad', 'inductance in series with the load', NONE),
];
const capacitance = parameter.capacitance('capacitanceF', 'C', 'capacitance of the filter');
const inductance = parameter.inductance('inductanceH', 'L', 'inductance of the filter');
const coil = parameter.resistance('coilResistanceOhm', 'RL', 'resistance of the coil', NONE);

const meaning =
  'current in the supply over a harmonic current fed in at the bus; equally, voltage at the bus over a voltage of the supply';

/**
 * Filters in parallel at a bus with a supply impedance Rs + sLs behind it and a load beside them. H = Z/(Z + Zs) with Z the
 * filter in parallel with the load. It is both the share of a harmonic current fed in at the bus that flows into the supply
 * (current divider), and the share of a background voltage behind the supply impedance that stands at the bus (voltage
 * divider); the two are equal by reciprocity. Forms of the filters: J. Arrillaga and N. R. Watson, Power System Harmonics,
 * chapter 6; IEEE Std 1531.
 */
export const shuntFilters = {
  'shunt-capacitor': {
    meaning,
    parameters: [capacitance, ...network],
    transfer: (v) => besideLoad(v, seriesImpedance({ capacitanceF: v.of('capacitanceF') })),
  },
  'single-tuned-filter': {
    meaning,
    parameters: [capacitance, inductance, coil, ...network],
    transfer: (v) => besideLoad(v, tunedBranch(v)),
  },
  'high-pass-filter': {
    meaning,
    parameters: [
      ...[capacitance, inductance, coil],
      parameter.resistance('dampingResistanceOhm', 'Rd', 'resistance in parallel with the coil'),
      ...network,
    ],
    transfer: (v) => besideLoad(v, highPassImpedance(v)),
  },
  'c-type-filter': {
    meaning,
    parameters: [
      capacitance,
      parameter.capacitance('auxiliaryCapacitanceF', 'C2', 'capacitance in series with the coil'),
      ...[inductance, coil],
      parameter.resistance('dampingResistanceOhm', 'Rd', 'resistance in parallel with the coil and C2'),
      ...network,
    ],
    transfer: (v) => besideLoad(v, cTypeImpedance(v)),
  },
  'line-reactor-at-converter': {
    meaning:
      'current of a harmonic with the reactor over that without it, for a load that acts as a source of harmonic voltage',
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
      ...[coil, ...network.slice(0, 2)],
    ],
    // Both impedances carry the same current: Zs/(Zs + Zr).
    transfer: (v) =>
      currentShare(
        {
          inductanceH: lineReactorInductance({
            impedancePercent: v.of('impedancePercent'),
            ratedVoltageV: v.of('ratedVoltageV'),
            ratedCurrentA: v.of('ratedCurrentA'),
            ratedFrequencyHz: v.of('ratedFrequencyHz'),
          }),
          resistanceOhm: v.of('coilResistanceOhm'),
        },
        { inductanceH: v.of('sourceInductanceH'), resistanceOhm: v.of('sourceResistanceOhm') },
      ),
  },
  'current-divider': {
    meaning: 'current in the branch looked at over the current that the two branches share',
    parameters: [
      parameter.resistance('branchResistanceOhm', 'R1', 'resistance of the branch looked at', NONE),
      parameter.inductance('branchInductanceH', 'L1', 'inductance of the branch looked at', NONE),
      parameter.capacitance('branchCapacitanceF', 'C1', 'capacitance in series with it', ABSENT),
      parameter.resistance('otherResistanceOhm', 'R2', 'resistance of the other branch', NONE),
      parameter.inductance('otherInductanceH', 'L2', 'inductance of the other branch', NONE),
      parameter.capacitance('otherCapacitanceF', 'C2', 'capacitance in series with it', ABSENT),
    ],
    transfer: (v) => {
      const branch = (which: string): SeriesBranch => ({
        resistanceOhm: v.of(`${which}ResistanceOhm`),
        inductanceH: v.of(`${which}InductanceH`),
        capacitanceF: v.maybe(`${which}CapacitanceF`),
      });
      return currentShare(branch('branch'), branch('other'));
    },
  },
} satisfies Record<string, CircuitKind>;

/**
 * Z2/(Z1 + Z2). With capacitors in both branches the factor s that all terms share is left out: it stands for a charge that
 * circulates once and never moves a current again.
 */
function currentShare(branch: SeriesBranch, other: SeriesBranch): TransferFunction {
  const bothBlock = branch.capacitanceF !== undefined && other.capacitanceF !== undefined;
  const [z1, z2] = [branch, other].map((one) => {
    const { numerator, denominator } = seriesImpedance(one);
    return { numerator, denominator: bothBlock ? denominator.slice(0, -1) : denominator };
  }) as [Impedance, Impedance];
  return transferFunction(multiplyPolynomials(z2.numerator, z1.denominator), inSeriesWith(z1, z2).numerator);
}

function besideLoad(v: CheckedValues, filter: Impedance): TransferFunction {
  const resistanceOhm = v.maybe('loadResistanceOhm');
  const supply: LadderElement = {
    series: seriesImpedance({
      inductanceH: v.of('sourceInductanceH'),
      resistanceOhm: v.of('sourceResistanceOhm'),
    }),
  };
  const load: LadderElement[] =
    resistanceOhm === undefined
      ? []
      : [{ shunt: seriesImpedance({ resistanceOhm, inductanceH: v.of('loadInductanceH') }) }];
  return ladderTransfer([supply, { shunt: filter }, ...load]);
}

function coilOf(v: CheckedValues): Impedance {
  return seriesImpedance({ inductanceH: v.of('inductanceH'), resistanceOhm: v.of('coilResistanceOhm') });
}

function tunedBranch(v: CheckedValues): Impedance {
  return inSeriesWith(seriesImpedance({ capacitanceF: v.of('capacitanceF') }), coilOf(v));
}

function highPassImpedance(v: CheckedValues): Impedance {
  const damping = seriesImpedance({ resistanceOhm: v.of('dampingResistanceOhm') });
  return inSeriesWith(
    seriesImpedance({ capacitanceF: v.of('capacitanceF') }),
    inParallelWith(damping, coilOf(v)),
  );
}

function cTypeImpedance(v: CheckedValues): Impedance {
  const damping = seriesImpedance({ resistanceOhm: v.of('dampingResistanceOhm') });
  const auxiliary = seriesImpedance({
    capacitanceF: v.of('auxiliaryCapacitanceF'),
    inductanceH: v.of('inductanceH'),
    resistanceOhm: v.of('coilResistanceOhm'),
  });
  return inSeriesWith(
    seriesImpedance({ capacitanceF: v.of('capacitanceF') }),
    inParallelWith(damping, auxiliary),
  );
}
