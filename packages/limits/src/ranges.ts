import type { Applicability, LimitSet, ParameterRange, VerdictParameters } from '@overtally/contracts';

/** Whether a value lies in the range; an end that is not given is open. */
export function isWithin({ above, from, below, upTo }: ParameterRange, value: number): boolean {
  return (
    (above === undefined || value > above) &&
    (from === undefined || value >= from) &&
    (below === undefined || value < below) &&
    (upTo === undefined || value <= upTo)
  );
}

/** The first condition of the set that a given parameter breaks; a parameter that is not given breaks none. */
export function brokenCondition(
  { applicability = [] }: Pick<LimitSet, 'applicability'>,
  parameters: VerdictParameters,
): Applicability | null {
  const breaks = (condition: Applicability) => {
    const value = parameters[condition.parameter];
    return value !== undefined && !isWithin(condition, value);
  };
  return applicability.find(breaks) ?? null;
}
