import type { Channel, ParameterName, Quantity } from '@overtally/contracts';

/** "3", "3 and 5", "3, 5 and 7". */
export function joined(words: readonly string[]): string {
  if (words.length < 2) return words[0] ?? '';
  return `${words.slice(0, -1).join(', ')} and ${words.at(-1)}`;
}

export const parameterWords: Record<ParameterName, string> = {
  powerW: 'the active power',
  powerFactor: 'the power factor',
  iscOverIl: 'the ratio Isc/IL',
  ilA: 'the demand current IL',
  rsce: 'the short-circuit ratio Rsce',
  irefA: 'the reference current Iref',
  nominalV: 'the nominal voltage',
};

export const quantityWords: Record<Quantity, string> = {
  voltage: 'voltage',
  current: 'current',
  power: 'power',
  sound_pressure: 'sound pressure',
  acceleration: 'acceleration',
  velocity: 'velocity',
  dimensionless: 'dimensionless',
  other: 'other',
};

/** Symbol of the fundamental by quantity (IEC 60050-131; IEC 80000-8 for sound and vibration): I, U, p, a. */
const symbols: Partial<Record<Quantity, string>> = {
  voltage: 'U',
  current: 'I',
  power: 'P',
  sound_pressure: 'p',
  acceleration: 'a',
  velocity: 'v',
};

/** Symbol of the rms of order 1, with its subscript: I₁. */
export const fundamentalSymbol = (quantity: Quantity): string => `${symbols[quantity] ?? 'X'}₁`;

/** Begins a title: "VA_G1, voltage against time"; a channel of no known quantity is called by its name alone. */
export function channelTitle({ quantity, name }: Pick<Channel, 'quantity' | 'name'>): string {
  if (quantity === 'dimensionless' || quantity === 'other') return name;
  return `${name}, ${quantityWords[quantity]}`;
}
