import type { TestConditions } from '@overtally/contracts';
import { formatSi } from './format.js';

/** Test conditions in one line; empty where none are known. */
export function conditionsWords(conditions: TestConditions): string {
  const { ambientTemperatureC, relativeHumidityPercent, supplyVoltageV, supplyFrequencyHz } = conditions;
  const { supply, place, remark } = conditions;
  const si = (value: number | undefined, unit: string) =>
    value === undefined ? '' : formatSi(value, unit, { digits: 6, trim: true });
  return [
    ambientTemperatureC === undefined ? '' : `${ambientTemperatureC} °C`,
    relativeHumidityPercent === undefined ? '' : `${relativeHumidityPercent} % r.h.`,
    [supply, si(supplyVoltageV, 'V'), si(supplyFrequencyHz, 'Hz')].filter(Boolean).join(' '),
    place,
    remark,
  ]
    .filter(Boolean)
    .join(', ');
}
