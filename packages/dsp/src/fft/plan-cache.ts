/** Keeps the plans used last. */
export interface PlanCache<Plan> {
  get(length: number, create: () => Plan): Plan;
}

const MOST_PLANS = 12;
/** Sum of the lengths kept, 2^21: about 100 MB of tables and scratch space. */
const MOST_SAMPLES = 2_097_152;

/** A cache by length that drops the plan not used for the longest time when there are too many or too long ones. */
export function createPlanCache<Plan>(): PlanCache<Plan> {
  const plans = new Map<number, Plan>();
  let samples = 0;
  return {
    get(length, create) {
      const plan = plans.get(length) ?? create();
      if (!plans.delete(length)) samples += length;
      plans.set(length, plan);
      for (const oldest of plans.keys()) {
        if (plans.size <= MOST_PLANS && samples <= MOST_SAMPLES) break;
        if (oldest === length) break;
        plans.delete(oldest);
        samples -= oldest;
      }
      return plan;
    },
  };
}
