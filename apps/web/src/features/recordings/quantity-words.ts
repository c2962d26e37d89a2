import type { Quantity } from '@overtally/contracts';

export const quantityWords: Record<Quantity, string> = {
  voltage: 'voltage',
  current: 'current',
  power: 'power',
  sound_pressure: 'sound pressure',
  acceleration: 'acceleration',
  velocity: 'velocity',
  dimensionless: 'no dimension',
  other: 'other',
};
