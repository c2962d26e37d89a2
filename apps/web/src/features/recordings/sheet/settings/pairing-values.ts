import type { Channel, Settings } from '@overtally/contracts';
import { proposePowerPairs } from '@overtally/dsp';
import type { SettingsForm } from './settings-form.js';

type Described = Pick<Channel, 'index' | 'name' | 'quantity' | 'unit'>;
type Pairing = Pick<SettingsForm, 'pairing' | 'pairs' | 'sets'>;
/** A pair as settings name it or as it is proposed. */
interface PairRow {
  voltage: number;
  current: number;
  phase?: 1 | 2 | 3 | null | undefined;
}
type Triple = [string, string, string];

const triple = ([first, second, third]: readonly [number, number, number]): Triple => [
  String(first),
  String(second),
  String(third),
];
const numbers = ([first, second, third]: Triple): [number, number, number] => [
  Number(first),
  Number(second),
  Number(third),
];
const phaseText = (phase: 1 | 2 | 3 | null | undefined) => (phase ? (`${phase}` as const) : '');
const phaseOf = (text: '' | '1' | '2' | '3') => (text === '' ? undefined : (Number(text) as 1 | 2 | 3));

const rowsOf = (pairs: readonly PairRow[]): SettingsForm['pairs'] =>
  pairs.map(({ voltage, current, phase }) => ({
    voltage: String(voltage),
    current: String(current),
    phase: phaseText(phase),
  }));
const setRowsOf = (sets: NonNullable<Settings['threePhase']>): SettingsForm['sets'] =>
  sets.map(({ voltages, currents, wires }) => ({
    voltages: triple(voltages),
    currents: triple(currents),
    wires,
  }));

/** Pairs and sets of three phases as settings name them, else as they are proposed from the channels. */
export function toPairing({ pairs, threePhase }: Settings, channels: readonly Described[]): Pairing {
  if (pairs !== undefined || threePhase !== undefined) {
    return { pairing: 'chosen', pairs: rowsOf(pairs ?? []), sets: setRowsOf(threePhase ?? []) };
  }
  const proposal = proposePowerPairs(channels);
  return {
    pairing: 'proposed',
    pairs: rowsOf(proposal.pairs),
    sets: setRowsOf(proposal.threePhase),
  };
}

/** What to send of them; nothing where the proposal stands, so that it follows the names of the channels. */
export function pairingSettings({ pairing, pairs, sets }: Pairing): Pick<Settings, 'pairs' | 'threePhase'> {
  if (pairing === 'proposed') return {};
  return {
    pairs: pairs.map(({ voltage, current, phase }) => ({
      voltage: Number(voltage),
      current: Number(current),
      phase: phaseOf(phase),
    })),
    threePhase: sets.map(({ voltages, currents, wires }) => ({
      voltages: numbers(voltages),
      currents: numbers(currents),
      wires,
    })),
  };
}

/** The proposal in a sentence: "u1 with i1, u2 with i2; three phases of u1, u2, u3 (four wires)". */
export function proposalWords(channels: readonly Described[]): string {
  const names = new Map(channels.map(({ index, name }) => [index, name]));
  const nameOf = (index: number) => names.get(index) ?? '';
  const { pairs, threePhase } = proposePowerPairs(channels);
  if (pairs.length === 0) return 'No voltage is told to belong to a current by its name.';
  const words = [
    pairs.map(({ voltage, current }) => `${nameOf(voltage)} with ${nameOf(current)}`).join(', '),
  ];
  for (const { voltages, wires } of threePhase) {
    const phases = voltages.map(nameOf).join(', ');
    words.push(`three phases of ${phases} (${wires === '3w' ? 'three wires' : 'four wires'})`);
  }
  return words.join('; ');
}
