import { AnalysisInputError } from '../errors.js';
import { orderPowers } from './order-powers.js';
import { commonOrders, isAboveNoise } from './phasors.js';
import { powerFigures } from './power-figures.js';
import { symmetricalComponents, unbalance } from './symmetrical-components.js';
import { threePhaseFigures } from './three-phase-figures.js';
import { transformerFactors } from './transformer-factors.js';
import type {
  NeutralOrder,
  PhaseNumber,
  PhasorSet,
  PowerPairResult,
  RecordPower,
  ThreePhaseResult,
  ThreePhaseSet,
  Triple,
} from './types.js';
import { unitFactor } from './unit-factor.js';

/** Phasors of one channel in its own unit. */
export interface PowerChannel {
  index: number;
  name: string;
  /** V or A with an SI prefix; blank counts as V or A. */
  unit: string;
  phasors: PhasorSet;
}

export interface RecordPowerInput {
  /** Fundamental at which the phasors of all channels were taken. */
  frequencyHz: number;
  channels: readonly PowerChannel[];
  pairs: readonly { voltage: number; current: number; phase?: PhaseNumber | null | undefined }[];
  threePhase: readonly ThreePhaseSet[];
  /** I_R of the nameplate for the rated K-factor. */
  ratedCurrentA?: number | null | undefined;
}

/**
 * Power results of a record as plain serialisable objects, in V, A, W, var and VA whatever the units of the channels.
 *
 * @throws AnalysisInputError for a pair or set that names a channel which is not there or has no unit of V or A
 */
export function recordPower(input: RecordPowerInput): RecordPower {
  const { frequencyHz } = input;
  const voltageOf = (index: number) => inBaseUnit(input.channels, index, 'V');
  const currentOf = (index: number) => inBaseUnit(input.channels, index, 'A');
  return {
    power: input.pairs.map((pair) => ({
      voltageChannel: pair.voltage,
      currentChannel: pair.current,
      phase: pair.phase ?? null,
      frequencyHz,
      ...pairResults(voltageOf(pair.voltage), currentOf(pair.current), input.ratedCurrentA ?? null),
    })),
    threePhase: input.threePhase.map((set) => ({
      voltageChannels: set.voltages,
      currentChannels: set.currents,
      wires: set.wires,
      frequencyHz,
      ...threePhaseResults(
        set.voltages.map(voltageOf) as Triple<PhasorSet>,
        set.currents.map(currentOf) as Triple<PhasorSet>,
        set.wires,
      ),
    })),
  };
}

function pairResults(
  voltage: PhasorSet,
  current: PhasorSet,
  ratedCurrentA: number | null,
): Omit<PowerPairResult, 'voltageChannel' | 'currentChannel' | 'phase' | 'frequencyHz'> {
  return {
    ...powerFigures(voltage, current),
    orders: orderPowers(voltage, current),
    transformer: transformerFactors(current.rms, { ratedCurrentA }),
  };
}

function threePhaseResults(
  voltages: Triple<PhasorSet>,
  currents: Triple<PhasorSet>,
  wires: ThreePhaseSet['wires'],
): Omit<ThreePhaseResult, 'voltageChannels' | 'currentChannels' | 'wires' | 'frequencyHz'> {
  const { figures, phases, neutral } = threePhaseFigures(voltages, currents, wires);
  const voltageSequences = symmetricalComponents(voltages);
  const currentSequences = symmetricalComponents(currents);
  return {
    ...figures,
    phases,
    neutralOrders: neutralOrders(neutral),
    voltageSequences,
    currentSequences,
    voltageUnbalance: unbalance(voltageSequences),
    currentUnbalance: unbalance(currentSequences),
  };
}

function neutralOrders(neutral: PhasorSet): NeutralOrder[] {
  return commonOrders(neutral).map((order) => ({
    order,
    rms: neutral.rms[order - 1]!,
    phaseDeg: isAboveNoise(neutral, order) ? neutral.phaseDeg[order - 1]! : null,
  }));
}

function inBaseUnit(channels: readonly PowerChannel[], index: number, base: 'V' | 'A'): PhasorSet {
  const channel = channels.find((candidate) => candidate.index === index);
  if (!channel) throw new AnalysisInputError(`There is no channel ${index} to compute a power from.`);
  const factor = unitFactor(channel.unit, base);
  if (factor === null) {
    throw new AnalysisInputError(
      `Channel "${channel.name}" has the unit "${channel.unit}"; a power needs ${base} here.`,
    );
  }
  const { dc, totalRms, rms, phaseDeg, noiseRms } = channel.phasors;
  return {
    dc: factor * dc,
    totalRms: factor * totalRms,
    rms: Array.from(rms, (x) => factor * x),
    phaseDeg,
    ...(noiseRms === undefined ? {} : { noiseRms: factor * noiseRms }),
  };
}
