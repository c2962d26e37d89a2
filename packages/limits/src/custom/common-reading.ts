import type { LimitEntry, LimitSet, TotalLimit } from '@overtally/contracts';

type Reading = Pick<LimitSet, 'basis' | 'unit' | 'referenceParameter'>;

const unitOfBasis: Readonly<Record<LimitSet['basis'], string>> = {
  absolute: '',
  'percent-of-fundamental': '%',
  'percent-of-reference': '%',
  'milliampere-per-watt': 'mA/W',
};

/** What the limits of a set refer to, with the unit that follows from it. */
export const readingOf = ({ basis, unit, referenceParameter }: Partial<Reading>): Reading => ({
  basis: basis ?? 'absolute',
  unit: basis === undefined || basis === 'absolute' ? (unit ?? '') : unitOfBasis[basis],
  referenceParameter: basis === 'percent-of-reference' ? (referenceParameter ?? null) : null,
});

const keyOf = (reading: Reading): string =>
  JSON.stringify([reading.basis, reading.unit, reading.referenceParameter]);
const ofEntry = (entry: LimitEntry): Reading | null => (entry.basis === undefined ? null : readingOf(entry));

/** What most entries say of themselves, the first of equals; null when none says anything. */
export function commonReading(orders: readonly LimitEntry[]): Reading | null {
  const counts = new Map<string, { reading: Reading; count: number }>();
  for (const entry of orders) {
    const reading = ofEntry(entry);
    if (reading === null) continue;
    const held = counts.get(keyOf(reading));
    counts.set(keyOf(reading), { reading, count: (held?.count ?? 0) + 1 });
  }
  const most = [...counts.values()].reduce<{ reading: Reading; count: number } | null>(
    (best, next) => (best === null || next.count > best.count ? next : best),
    null,
  );
  return most?.reading ?? null;
}

/** Entries and totals without what they say of themselves where the set says the same. */
export function readByOwn<Limits extends { orders: LimitEntry[]; totals: TotalLimit[] }>(
  limits: Limits,
  reading: Reading,
): Limits {
  return {
    ...limits,
    orders: limits.orders.map((entry) => {
      const own = ofEntry(entry);
      if (own === null || keyOf(own) !== keyOf(reading)) return entry;
      const { basis: _basis, unit: _unit, referenceParameter: _reference, ...bare } = entry;
      return bare;
    }),
    totals: limits.totals.map(({ basis, ...total }) =>
      basis === undefined || (basis === reading.basis && total.name !== 'THD') ? total : { ...total, basis },
    ),
  };
}
