import type { LimitSet, Quantity } from '@overtally/contracts';

export interface LimitFilter {
  q: string;
  quantity: Quantity | null;
}

/** Sets that hold every word of the search in their name, edition, use or source, and are for the quantity. */
export function filterLimitSets(sets: readonly LimitSet[], { q, quantity }: LimitFilter): LimitSet[] {
  const words = q.toLocaleLowerCase().split(/\s+/).filter(Boolean);
  return sets.filter((set) => {
    const text = [set.standard, set.title, set.edition, set.tableRef, set.appliesWhen, ...set.source]
      .join(' ')
      .toLocaleLowerCase();
    return (quantity === null || set.quantity === quantity) && words.every((word) => text.includes(word));
  });
}
