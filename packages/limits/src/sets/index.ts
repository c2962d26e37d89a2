import type { LimitSet } from '@overtally/contracts';
import {
  iec61000_3_12Table2,
  iec61000_3_12Table3,
  iec61000_3_12Table4,
  iec61000_3_12Table5,
} from './iec61000-3-12.js';
import {
  classC5To25WEdition5,
  classCAbove25WEdition4,
  classCAbove25WEdition5,
  classCUpTo25WEdition4,
} from './iec61000-3-2-class-c.js';
import { iec61000_3_2ClassA, iec61000_3_2ClassB, iec61000_3_2ClassD } from './iec61000-3-2.js';
import { ieee519Current, ieee519Voltage } from './ieee519.js';
import { iec61000_2_4Class1, iec61000_2_4Class2, iec61000_2_4Class3 } from './industrial.js';
import { iec61000_3_6Hv, iec61000_3_6Mv } from './planning.js';
import { en50160Lv, en50160Mv, iec61000_2_2Lv } from './voltage.js';

/**
 * Published limit sets, each with edition, table, source and how far it was checked. The first of a quantity is
 * offered first, so those that need no parameter stand before the others.
 */
export const publishedLimitSets: readonly LimitSet[] = [
  iec61000_3_2ClassA,
  iec61000_3_2ClassB,
  classCAbove25WEdition5,
  classCAbove25WEdition4,
  classC5To25WEdition5,
  classCUpTo25WEdition4,
  iec61000_3_2ClassD,
  iec61000_3_12Table2,
  iec61000_3_12Table3,
  iec61000_3_12Table4,
  iec61000_3_12Table5,
  ...ieee519Current,
  en50160Lv,
  en50160Mv,
  iec61000_2_2Lv,
  iec61000_2_4Class1,
  iec61000_2_4Class2,
  iec61000_2_4Class3,
  ieee519Voltage,
  iec61000_3_6Mv,
  iec61000_3_6Hv,
];

const byId = new Map(publishedLimitSets.map((set) => [set.id, set]));

/** The published set of this id, such as `iec61000-3-2.classA`; undefined when there is none. */
export function findPublishedLimitSet(id: string): LimitSet | undefined {
  return byId.get(id);
}
