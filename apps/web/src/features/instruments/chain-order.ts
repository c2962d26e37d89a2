/** The list with the entry at `from` put at `to`; the others keep their order. */
export function moved(ids: readonly string[], from: number, to: number): string[] {
  const rest = ids.filter((_, at) => at !== from);
  return rest.toSpliced(to, 0, ids[from]!);
}
