/** A number as people type it, with a point or a comma; NaN for anything else, undefined for nothing at all. */
export function numberOf(text: string): number | undefined {
  const trimmed = text.trim();
  return trimmed === '' ? undefined : Number(trimmed.replace(',', '.').replace('\u2212', '-'));
}

/** A number for a field, without digits that only binary arithmetic has put there: 0.3, not 0.30000000000000004. */
export const numberText = (value: number, digits = 9): string => String(Number(value.toPrecision(digits)));
