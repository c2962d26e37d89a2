import {
  DIGITS,
  isLineToLine,
  isNeutral,
  LETTER_ALPHABETS,
  otherNumbers,
  phaseReadings,
  readName,
  type ChannelName,
  type PowerQuantity,
} from './channel-names.js';
import type { PhaseNumber, PowerPair, ThreePhaseSet, Triple } from './types.js';
import { unitFactor } from './unit-factor.js';

/** What a channel is called and measures. */
export interface DescribedChannel {
  index: number;
  name: string;
  quantity: string;
  unit: string;
}

export interface ProposedThreePhaseSet extends ThreePhaseSet {
  /** Why these belong together, and what the wires rest on, in plain words. */
  reason: string;
}

export interface PowerProposal {
  pairs: PowerPair[];
  threePhase: ProposedThreePhaseSet[];
}

interface NamedChannel extends ChannelName {
  index: number;
  name: string;
}

/** Three channels of one quantity that are phases 1, 2, 3 of one circuit. */
interface PhaseTriple {
  alphabet: string;
  stem: string;
  toNeutral: boolean;
  channels: Triple<NamedChannel>;
}

/**
 * Proposes which voltage and current channels belong together, from their quantities and names: the same name apart from
 * the quantity (u1/i1, VA_G1/IA_G1, Voltage L1/Current L1), or the only voltage with the only current. Three-phase sets
 * need all three phases of both quantities. What is ambiguous is left out. Naming follows common practice; no standard
 * fixes it.
 *
 * @param channels those of other quantities, and of units that are no volts or amperes, are passed over
 */
export function proposePowerPairs(channels: readonly DescribedChannel[]): PowerProposal {
  const voltages = named(channels, 'voltage');
  const currents = named(channels, 'current');
  const voltageTriples = phaseTriples(voltages);
  const currentTriples = phaseTriples(currents);
  const sets = matchTriples(voltageTriples, currentTriples);
  const inSets = new Set(sets.flatMap(([v, i]) => [...v.channels, ...i.channels]));
  const phases = new Map(
    [...voltageTriples, ...currentTriples].flatMap((triple) =>
      triple.channels.map((channel, k) => [channel, (k + 1) as PhaseNumber]),
    ),
  );
  const single = matchSingles(
    voltages.filter((channel) => !inSets.has(channel)),
    currents.filter((channel) => !inSets.has(channel)),
    voltages.length === 1 && currents.length === 1,
  ).map(([v, i]) => ({
    voltage: v.index,
    current: i.index,
    phase: phases.get(v) ?? phases.get(i) ?? null,
  }));
  const ofSets = sets.flatMap(([v, i]) =>
    v.channels.map((voltage, k) => ({
      voltage: voltage.index,
      current: i.channels[k]!.index,
      phase: (k + 1) as PhaseNumber,
    })),
  );
  return {
    pairs: [...ofSets, ...single].sort((a, b) => a.voltage - b.voltage),
    threePhase: sets.map(([v, i]) => describeSet(v, i, currents)),
  };
}

function named(channels: readonly DescribedChannel[], quantity: PowerQuantity): NamedChannel[] {
  const names = channels.filter((channel) => channel.quantity === quantity).map(({ name }) => name);
  return channels
    .filter((channel) => channel.quantity === quantity)
    .filter(({ unit }) => unitFactor(unit, quantity === 'voltage' ? 'V' : 'A') !== null)
    .map(({ index, name, unit }) => ({ index, name, ...readName(name, unit, quantity, names) }));
}

/** Letters tell phases more surely than digits, so digits are read only where letters gave nothing. */
function phaseTriples(channels: NamedChannel[]): PhaseTriple[] {
  const byLetter = completeTriples(channels, LETTER_ALPHABETS);
  const used = new Set(byLetter.flatMap((triple) => triple.channels));
  const numbered = new Set(channels.flatMap(otherNumbers));
  const byDigit = completeTriples(
    channels.filter((channel) => !used.has(channel)),
    [DIGITS],
  ).filter((triple) => !numbered.has(triple.stem));
  return [byLetter, byDigit].flatMap(withoutOverlaps);
}

function completeTriples(channels: NamedChannel[], alphabets: readonly string[]): PhaseTriple[] {
  const groups = new Map<string, { channel: NamedChannel; phase: PhaseNumber; toNeutral: boolean }[]>();
  for (const channel of channels) {
    for (const { alphabet, stem, phase, toNeutral } of phaseReadings(channel, alphabets)) {
      const key = `${alphabet} ${stem}`;
      groups.set(key, [...(groups.get(key) ?? []), { channel, phase, toNeutral }]);
    }
  }
  return [...groups].flatMap(([key, members]) => {
    const sorted = [...members].sort((a, b) => a.phase - b.phase);
    if (sorted.map(({ phase }) => phase).join('') !== '123') return [];
    return [
      {
        alphabet: key.slice(0, 3),
        stem: key.slice(4),
        toNeutral: sorted.every(({ toNeutral }) => toNeutral),
        channels: sorted.map(({ channel }) => channel) as Triple<NamedChannel>,
      },
    ];
  });
}

/** A channel that would be a phase of two circuits is ambiguous. */
function withoutOverlaps(triples: PhaseTriple[]): PhaseTriple[] {
  return triples.filter((triple) =>
    triples.every(
      (other) => other === triple || !other.channels.some((channel) => triple.channels.includes(channel)),
    ),
  );
}

/** Circuits of the same name; where a record holds one of each, those two, unless both are named differently. */
function matchTriples(voltages: PhaseTriple[], currents: PhaseTriple[]): [PhaseTriple, PhaseTriple][] {
  const [voltage, ...furtherVoltages] = voltages;
  const [current, ...furtherCurrents] = currents;
  if (voltage && current && furtherVoltages.length + furtherCurrents.length === 0) {
    const isNamed = [voltage, current].every(({ stem }) => stem !== '#');
    return voltage.stem === current.stem || !isNamed ? [[voltage, current]] : [];
  }
  return uniqueMatches(voltages, currents, ({ stem }) => stem);
}

function matchSingles(
  voltages: NamedChannel[],
  currents: NamedChannel[],
  areOnlyOnes: boolean,
): [NamedChannel, NamedChannel][] {
  if (areOnlyOnes && canBelongTogether(voltages[0], currents[0])) return [[voltages[0]!, currents[0]!]];
  return uniqueMatches(voltages, currents, ({ words }) => words.join(' '));
}

/** The only voltage and the only current, unless their names speak against it: a line voltage, a neutral, two phases. */
function canBelongTogether(voltage: NamedChannel | undefined, current: NamedChannel | undefined): boolean {
  if (!voltage || !current || isLineToLine(voltage) || isNeutral(current)) return false;
  const alphabets = [...LETTER_ALPHABETS, DIGITS];
  const others = phaseReadings(current, alphabets);
  return phaseReadings(voltage, alphabets).every((reading) =>
    others.every((other) => other.alphabet !== reading.alphabet || other.phase === reading.phase),
  );
}

function uniqueMatches<T>(voltages: T[], currents: T[], keyOf: (item: T) => string): [T, T][] {
  return voltages.flatMap((voltage) => {
    const key = keyOf(voltage);
    const same = (item: T) => keyOf(item) === key;
    const partners = currents.filter(same);
    return partners.length === 1 && voltages.filter(same).length === 1
      ? [[voltage, partners[0]!] as [T, T]]
      : [];
  });
}

function describeSet(
  voltage: PhaseTriple,
  current: PhaseTriple,
  currents: NamedChannel[],
): ProposedThreePhaseSet {
  const list = (triple: PhaseTriple) => triple.channels.map(({ name }) => name).join(', ');
  const basis =
    voltage.stem === current.stem
      ? `${list(voltage)} and ${list(current)} are named alike`
      : `${list(voltage)} and ${list(current)} are the only three phases of the record`;
  const neutralName = current.stem.replace('#', 'n');
  const hasNeutral = voltage.toNeutral || currents.some(({ words }) => words.join(' ') === neutralName);
  const wires = hasNeutral
    ? 'the names speak of a neutral'
    : 'the voltages are taken as measured to neutral: three wires apply where they refer to a star point';
  return {
    voltages: voltage.channels.map(({ index }) => index) as Triple<number>,
    currents: current.channels.map(({ index }) => index) as Triple<number>,
    wires: '4w',
    reason: `${basis}; ${wires}.`,
  };
}
