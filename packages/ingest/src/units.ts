import type { Quantity } from './types.js';

/** A unit broken into its base and the factor of its prefix: kV is 1000 V. */
export interface UnitMeaning {
  base: string;
  factor: number;
  quantity: Quantity;
}

const PREFIXES: Record<string, number> = {
  G: 1e9,
  M: 1e6,
  k: 1e3,
  m: 1e-3,
  u: 1e-6,
  n: 1e-9,
  p: 1e-12,
};

const PREFIXED: Record<string, Quantity> = {
  V: 'voltage',
  A: 'current',
  W: 'power',
  Pa: 'sound_pressure',
  s: 'other',
  Hz: 'other',
  VA: 'other',
  var: 'other',
  N: 'other',
  Nm: 'other',
  Ohm: 'other',
  g: 'acceleration',
  'm/s²': 'acceleration',
  'm/s': 'velocity',
};

const PLAIN: Record<string, Quantity> = {
  '1': 'dimensionless',
  '%': 'dimensionless',
  counts: 'dimensionless',
  FS: 'dimensionless',
  '°C': 'other',
  K: 'other',
  kg: 'other',
  dB: 'other',
  rpm: 'other',
  '1/min': 'other',
  deg: 'other',
  rad: 'other',
  '°': 'other',
};

const SPELLINGS: Record<string, string> = {
  volt: 'V',
  volts: 'V',
  millivolt: 'mV',
  millivolts: 'mV',
  kilovolts: 'kV',
  amp: 'A',
  amps: 'A',
  ampere: 'A',
  amperes: 'A',
  milliamps: 'mA',
  watt: 'W',
  watts: 'W',
  pascal: 'Pa',
  sec: 's',
  secs: 's',
  second: 's',
  seconds: 's',
  sekunde: 's',
  sekunden: 's',
  millisecond: 'ms',
  milliseconds: 'ms',
  msec: 'ms',
  microsecond: 'us',
  microseconds: 'us',
  usec: 'us',
  nanosecond: 'ns',
  nanoseconds: 'ns',
  nsec: 'ns',
  hertz: 'Hz',
  ohm: 'Ohm',
  ω: 'Ohm',
  count: 'counts',
  percent: '%',
  'rev/min': 'rpm',
};

/**
 * Meaning of a unit as written in a file, SI prefix split off as a factor.
 * @returns null for text that is no unit known here
 */
export function unitMeaning(written: string): UnitMeaning | null {
  const tidy = written
    .trim()
    .replace(/[µμ]/g, 'u')
    .replace(/s\^?2$|s\*\*2$|_s2$/, (end) => (end.startsWith('_') ? '/s²' : 's²'));
  const word = tidy.toLowerCase();
  const unit = Object.hasOwn(SPELLINGS, word) ? (SPELLINGS[word] as string) : tidy;
  if (Object.hasOwn(PLAIN, unit)) return { base: unit, factor: 1, quantity: PLAIN[unit] as Quantity };
  if (Object.hasOwn(PREFIXED, unit)) return { base: unit, factor: 1, quantity: PREFIXED[unit] as Quantity };
  const base = unit.slice(1);
  const factor = Object.hasOwn(PREFIXES, unit.charAt(0)) ? PREFIXES[unit.charAt(0)] : undefined;
  if (factor === undefined || !Object.hasOwn(PREFIXED, base)) return null;
  return { base, factor, quantity: PREFIXED[base] as Quantity };
}

/** Seconds per unit for a unit of time, null for any other. */
export function secondsPerUnit(written: string): number | null {
  const meaning = unitMeaning(written);
  return meaning?.base === 's' ? meaning.factor : null;
}
