import type { LimitEntry, LimitSet } from '@overtally/contracts';
import { byFormula, listed, ordersBetween, sorted } from './orders.js';
import {
  evenLevels,
  highMultiplesOfThree,
  notMultiplesOfThree,
  shortRecord,
  voltageShared,
} from './voltage.js';
import { checkEdition } from './wording.js';

const shared = {
  ...voltageShared,
  standard: 'IEC 61000-2-4',
  edition: '2:2002 (edition 3:2024 not checked)',
  tableRef: 'Tables 2 to 5',
  applicability: [
    {
      parameter: 'nominalV',
      upTo: 35_000,
      otherwise: 'IEC 61000-2-4 is for industrial and non-public networks of a nominal voltage up to 35 kV',
    },
  ],
} satisfies Partial<LimitSet>;

const level =
  'A compatibility level is a reference value for coordination, not an emission limit of one apparatus.';
const notes = [shortRecord, level, checkEdition];

const commonLevels = (values: Readonly<Record<number, number>>): LimitEntry[] =>
  sorted(
    listed({ 2: 2, 4: 1, 6: 0.5, 8: 0.5, 10: 0.5, 17: 2, ...values }),
    byFormula(notMultiplesOfThree(19), '2.27*(17/n)-0.27', (n) => 2.27 * (17 / n) - 0.27),
    highMultiplesOfThree(0.2),
    evenLevels(12),
  );

/** IEC 61000-2-4:2002, class 1: protected supplies of sensitive equipment, % of the fundamental. */
export const iec61000_2_4Class1: LimitSet = {
  ...shared,
  id: 'iec61000-2-4.class1',
  title: 'IEC 61000-2-4, compatibility levels, class 1',
  appliesWhen: 'Protected supplies of sensitive equipment',
  orders: commonLevels({ 3: 3, 5: 3, 7: 3, 9: 1.5, 11: 3, 13: 3, 15: 0.3, 21: 0.2 }),
  totals: [{ name: 'THD', limit: 5, maxOrder: 50 }],
  source: ['From memory'],
  confidence: 'medium',
  evidence: 'memory',
  notes,
};

/** IEC 61000-2-4:2002, class 2: points of common coupling and in-plant points in general, % of the fundamental. */
export const iec61000_2_4Class2: LimitSet = {
  ...shared,
  id: 'iec61000-2-4.class2',
  title: 'IEC 61000-2-4, compatibility levels, class 2',
  appliesWhen: 'Points of common coupling and in-plant points in general',
  orders: commonLevels({ 3: 5, 5: 6, 7: 5, 9: 1.5, 11: 3.5, 13: 3, 15: 0.4, 21: 0.3 }),
  totals: [{ name: 'THD', limit: 8, maxOrder: 50 }],
  source: [
    'HarmonicPowerModels.jl, library for optimal power flow, limit tables, https://github.com/timmyfaraday/HarmonicPowerModels.jl',
    'Public network-calculation source that restates IEC 61000-2-4 class 2',
  ],
  confidence: 'high',
  evidence: 'source',
  notes: ['One source prints 0.2 % at order 21, another 0.3 %; 0.3 % agrees with IEC 61000-2-2.', ...notes],
};

/** IEC 61000-2-4:2002, class 3: in-plant points with large converters, welders, motors, % of the fundamental. */
export const iec61000_2_4Class3: LimitSet = {
  ...shared,
  id: 'iec61000-2-4.class3',
  title: 'IEC 61000-2-4, compatibility levels, class 3',
  appliesWhen: 'In-plant points that feed large converters, welders or motors that start often',
  orders: sorted(
    listed({ 2: 3, 3: 6, 4: 1.5, 5: 8, 7: 7, 9: 2.5, 11: 5, 13: 4.5, 15: 2, 17: 4, 21: 1.75 }),
    byFormula(notMultiplesOfThree(19), '4.5*(17/n)-0.5', (n) => 4.5 * (17 / n) - 0.5),
    highMultiplesOfThree(1),
    ordersBetween(6, 50, 2).map((order) => ({ order, limit: 1 })),
  ),
  totals: [{ name: 'THD', limit: 10, maxOrder: 50 }],
  source: ['From memory'],
  confidence: 'medium',
  evidence: 'memory',
  notes,
};
