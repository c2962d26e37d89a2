import type { VerdictParameters } from '@overtally/contracts';
import { formatSi } from '../../lib/format.js';
import { parameterWords, type ParameterKey } from './verdict-words.js';

/** Parameters of a verdict as one sentence: "Active power 180 W, power factor 0.95." Empty without any. */
export function parameterLine(parameters: VerdictParameters): string {
  const keys = (Object.keys(parameterWords) as ParameterKey[]).filter((key) => parameters[key] !== undefined);
  if (keys.length === 0) return '';
  const parts = keys.map((key) => {
    const { label, unit } = parameterWords[key];
    return `${label} ${formatSi(parameters[key], unit, { trim: true })}`;
  });
  const [first = '', ...rest] = parts;
  return `${[first, ...rest.map((part) => part.charAt(0).toLowerCase() + part.slice(1))].join(', ')}.`;
}
