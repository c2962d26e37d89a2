import type { EquipmentRatings } from '@overtally/contracts';
import { formatSi } from '../../lib/format.js';

/** What a rating plate says, each with its caption, in the order of such plates. */
export function ratingWords(ratings: EquipmentRatings): { caption: string; value: string }[] {
  const si = (value: number | undefined, unit: string) =>
    value === undefined ? null : formatSi(value, unit, { digits: 6, trim: true });
  const { voltageV, currentA, powerW, frequencyHz, phases, emissionClass } = ratings;
  const entries = [
    { caption: 'Voltage', value: si(voltageV, 'V') },
    { caption: 'Phases', value: phases === undefined ? null : String(phases) },
    { caption: 'Frequency', value: si(frequencyHz, 'Hz') },
    { caption: 'Current', value: si(currentA, 'A') },
    { caption: 'Power', value: si(powerW, 'W') },
    { caption: 'Emission class', value: emissionClass ?? null },
  ];
  return entries.flatMap(({ caption, value }) => (value === null ? [] : [{ caption, value }]));
}
