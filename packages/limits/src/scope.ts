import type { LimitSet, ParameterName, Quantity, VerdictParameters } from '@overtally/contracts';
import { limitUnit, readBy } from './limit-for-order.js';
import type { Measurement } from './measurement.js';
import { neededParameters, optionalParameters } from './resolve.js';
import { unitRatio } from './units.js';

const quantityNames: Readonly<Record<Quantity, string>> = {
  voltage: 'voltage',
  current: 'current',
  power: 'power',
  sound_pressure: 'sound pressure',
  acceleration: 'acceleration',
  velocity: 'velocity',
  dimensionless: 'a quantity without dimension',
  other: 'another quantity',
};

/** Why the quantity or the unit of the channel does not go with the set; null when both do. */
export function mismatch(set: LimitSet, measurement: Measurement): string | null {
  if (set.quantity !== measurement.quantity) {
    return `The set limits ${quantityNames[set.quantity]}; the channel holds ${quantityNames[measurement.quantity]}`;
  }
  const units = [limitUnit(set), ...set.orders.map((entry) => limitUnit(readBy(set, entry)))];
  const unfit = units.find((unit) => unit !== null && unitRatio(unit, measurement.unit) === null);
  if (unfit === undefined || unfit === null) return null;
  const given = measurement.unit === '' ? 'has no unit' : `is in ${measurement.unit}`;
  return `The limits are in ${unfit}; the channel ${given}: set the unit of the channel`;
}

/** Furthest a supply voltage in normal operation is from its nominal value (EN 50160, 4.2.2 and 5.2.2). */
const supplyTolerance = 0.15;

const asksFor = (set: LimitSet, name: ParameterName): boolean =>
  [...neededParameters(set), ...optionalParameters(set)].includes(name);

/**
 * Parameters as they hold for the channel. A voltage set may be given the nominal voltage between lines for a
 * channel from line to neutral: `nominalV` is then divided by the root of 3, when the fundamental is within 15 %
 * of that and not of the voltage given. `unfit` says why the channel is not of the nominal voltage at all.
 */
export function referredToChannel(
  set: LimitSet,
  { fundamentalRms, unit, quantity }: Measurement,
  parameters: VerdictParameters,
): { parameters: VerdictParameters; unfit: string | null } {
  const { nominalV } = parameters;
  const ratio = unitRatio(unit, 'V');
  if (quantity !== 'voltage' || nominalV === undefined || !asksFor(set, 'nominalV')) {
    return { parameters, unfit: null };
  }
  if (fundamentalRms === null || ratio === null) return { parameters, unfit: null };
  const volts = fundamentalRms * ratio;
  const isNear = (nominal: number) => Math.abs(volts - nominal) <= supplyTolerance * nominal;
  if (isNear(nominalV)) return { parameters, unfit: null };
  const phase = nominalV / Math.sqrt(3);
  if (isNear(phase)) return { parameters: { ...parameters, nominalV: phase }, unfit: null };
  const measured = `The fundamental is ${Number(volts.toPrecision(4))} V`;
  const unfit = `${measured}, more than 15 % from a nominal voltage of ${nominalV} V: the channel is not a supply of that voltage, or its scaling is wrong`;
  return { parameters, unfit };
}

const maximumPhaseA = 16;

/**
 * What to bear in mind about the scope: IEC 61000-3-2 is for equipment of up to 16 A per phase. The rated current
 * decides, which the channel does not tell, so more than 16 A is said and not judged.
 */
export function scopeCaution({ procedure }: LimitSet, { rms, unit }: Measurement): string | null {
  const amperes = rms === null ? 0 : rms * (unitRatio(unit, 'A') ?? 0);
  if (procedure !== 'iec61000-3-2' || amperes <= maximumPhaseA) return null;
  return `The input current of ${Number(amperes.toPrecision(4))} A is above 16 A: the set applies only if the rated current is not`;
}
