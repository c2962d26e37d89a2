/**
 * The column that keeps since when something is retired; what is retired already stays so since then.
 * @param retired what a change says; undefined: nothing
 */
export function retirement(retired: boolean | undefined, since: Date | null): { retiredAt?: Date | null } {
  if (retired === undefined) return {};
  return { retiredAt: retired ? (since ?? new Date()) : null };
}
