import type { LimitSet } from '@overtally/contracts';
import { iec61000_3_2ClassA, iec61000_3_2ClassB, iec61000_3_2ClassD } from './iec61000-3-2.js';
import { en50160Lv, iec61000_2_2Lv } from './voltage.js';

/** Published limit sets, each with edition, table, source and how far it was checked. */
export const publishedLimitSets: readonly LimitSet[] = [
  iec61000_3_2ClassA,
  iec61000_3_2ClassB,
  iec61000_3_2ClassD,
  en50160Lv,
  iec61000_2_2Lv,
];

/** The published set of this id, such as `iec61000-3-2.classA`; undefined when there is none. */
export function findPublishedLimitSet(id: string): LimitSet | undefined {
  return publishedLimitSets.find((set) => set.id === id);
}
