import type { Quantity } from '@overtally/contracts';

const words: Record<Quantity, string> = {
  voltage: 'Voltage',
  current: 'Current',
  power: 'Power',
  sound_pressure: 'Sound pressure',
  acceleration: 'Acceleration',
  velocity: 'Velocity',
  dimensionless: 'A plain number',
  other: 'Something else',
};

export const quantityOptions = (Object.keys(words) as Quantity[]).map((value) => ({
  value,
  label: words[value],
}));

/** "current in A" */
export const physicalWords = (quantity: Quantity, unit: string): string =>
  unit ? `${words[quantity].toLowerCase()} in ${unit}` : words[quantity].toLowerCase();
