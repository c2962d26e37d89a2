/** Keeps the plans used last. */
export interface PlanCache<Plan> {
  /** @param samples length of the plan, for the memory that it takes */
  get(key: string, samples: number, create: () => Plan): Plan;
}

const MOST_PLANS = 12;
/** Sum of the lengths kept, 2^21: about 100 MB of tables and scratch space. */
const MOST_SAMPLES = 2_097_152;

/** A cache that drops the plan not used for the longest time when there are too many or too long ones. */
export function createPlanCache<Plan>(): PlanCache<Plan> {
  const entries = new Map<string, { plan: Plan; samples: number }>();
  let total = 0;
  return {
    get(key, samples, create) {
      const entry = entries.get(key) ?? { plan: create(), samples };
      if (!entries.delete(key)) total += samples;
      entries.set(key, entry);
      for (const [oldest, { samples: freed }] of entries) {
        if (entries.size <= MOST_PLANS && total <= MOST_SAMPLES) break;
        if (oldest === key) break;
        entries.delete(oldest);
        total -= freed;
      }
      return entry.plan;
    },
  };
}
