/** Number of a report as people write it: HR-0001. */
export const reportNumber = (number: number): string => `HR-${String(number).padStart(4, '0')}`;

const written = /^\s*HR[\s-]*(\d{1,9})\s*$/i;

/** The number that a written one stands for; null for what is none. */
export function parsedReportNumber(text: string): number | null {
  const digits = written.exec(text)?.[1];
  return digits === undefined ? null : Number(digits);
}
