import type { LimitEntry, LimitSet } from '@overtally/contracts';
import { byFormula, listed, ordersBetween, sorted } from './orders.js';
import { checkEdition, weekOfTenMinutes } from './wording.js';

/** Stands among the notes of the sets that take a week of 10 min values. */
export const shortRecord =
  'The statistic of the standard is 95 % of the 10 min mean values of one week. A short record is a comparison with the values only, not a statement of conformity with the standard.';

/** What the sets of supply voltages have in common. */
export const voltageShared = {
  projectId: null,
  version: 1,
  quantity: 'voltage',
  unit: '%',
  basis: 'percent-of-fundamental',
  referenceParameter: null,
  procedure: 'plain',
  parameters: [],
  statistic: weekOfTenMinutes,
} satisfies Partial<LimitSet>;

const en50160Values: Readonly<Record<number, number>> = {
  2: 2,
  3: 5,
  4: 1,
  5: 6,
  7: 5,
  9: 1.5,
  11: 3.5,
  13: 3,
  15: 0.5,
  17: 2,
  19: 1.5,
  21: 0.5,
  23: 1.5,
  25: 1.5,
};

const en50160Orders: LimitEntry[] = Array.from({ length: 24 }, (_, i) => {
  const order = i + 2;
  return { order, limit: en50160Values[order] ?? 0.5 };
});

/** EN 50160:2010, Table 1: harmonic voltages at the supply terminals, low voltage, % of the fundamental. */
export const en50160Lv: LimitSet = {
  ...voltageShared,
  id: 'en50160.lv',
  standard: 'EN 50160',
  edition: '2010 (values of the base text)',
  title: 'EN 50160, low-voltage supply',
  tableRef: 'Table 1',
  appliesWhen: 'Supply terminals of public low-voltage networks',
  applicability: [
    {
      parameter: 'nominalV',
      upTo: 1000,
      otherwise:
        'EN 50160 counts a nominal voltage up to 1 kV as low voltage; use the set for medium voltage',
    },
  ],
  orders: en50160Orders,
  totals: [{ name: 'THD', limit: 8, maxOrder: 40 }],
  source: [
    'Rockwell Automation publication 1426-UM001J-EN-P (August 2019), appendix H, Table 228',
    'Schneider Electric technical note on EN 50160 harmonic voltage criteria',
  ],
  confidence: 'high',
  evidence: 'source',
  notes: [
    shortRecord,
    'No values above order 25: usually small, but unpredictable because of resonance.',
    'Later texts (A3:2019, 2022) are believed to give 1.0 % at order 15 and 0.75 % at order 21; not checked.',
    checkEdition,
  ],
};

/** EN 50160:2010, Table 4: harmonic voltages at the supply terminals, medium voltage, % of the fundamental. */
export const en50160Mv: LimitSet = {
  ...voltageShared,
  id: 'en50160.mv',
  standard: 'EN 50160',
  edition: '2010 (values of the base text)',
  title: 'EN 50160, medium-voltage supply',
  tableRef: 'Table 4',
  appliesWhen: 'Supply terminals of public medium-voltage networks, above 1 kV up to and including 36 kV',
  parameters: ['nominalV'],
  applicability: [
    {
      parameter: 'nominalV',
      above: 1000,
      upTo: 36000,
      otherwise: 'EN 50160 counts a nominal voltage above 1 kV up to and including 36 kV as medium voltage',
    },
  ],
  orders: en50160Orders,
  totals: [{ name: 'THD', limit: 8, maxOrder: 40 }],
  source: ['From memory: the numbers of the low-voltage table; the clause and table numbers'],
  confidence: 'medium',
  evidence: 'memory',
  notes: [
    shortRecord,
    'No values above order 25: usually small, but unpredictable because of resonance.',
    'The third order may be much lower than 5 %, depending on the design of the network.',
    'Later texts (A3:2019, 2022) are believed to give 1.0 % at order 15 and 0.75 % at order 21 at low voltage; not checked.',
    checkEdition,
  ],
};

/** Even orders 10 to 50 of the compatibility levels: 0.25 (10/h) + 0.25. */
export const evenLevels = (first: number): LimitEntry[] =>
  byFormula(ordersBetween(first, 50, 2), '0.25*(10/n)+0.25', (n) => 0.25 * (10 / n) + 0.25);

/** Odd orders up to 49 that 3 does not divide. */
export const notMultiplesOfThree = (first: number): number[] =>
  ordersBetween(first, 49, 2).filter((order) => order % 3 !== 0);

/** Orders 27 to 45 that 3 divides, all with one level. */
export const highMultiplesOfThree = (limit: number): LimitEntry[] =>
  ordersBetween(27, 45, 6).map((order) => ({ order, limit }));

const iec61000_2_2Orders: LimitEntry[] = sorted(
  listed({ 2: 2, 3: 5, 4: 1, 5: 6, 6: 0.5, 7: 5, 8: 0.5, 9: 1.5, 11: 3.5, 13: 3, 15: 0.4, 21: 0.3 }),
  byFormula(notMultiplesOfThree(17), '2.27*(17/n)-0.27', (n) => 2.27 * (17 / n) - 0.27),
  highMultiplesOfThree(0.2),
  evenLevels(10),
);

/** IEC 61000-2-2:2002, Table 1: compatibility levels, low voltage, long-term effects, % of the fundamental. */
export const iec61000_2_2Lv: LimitSet = {
  ...voltageShared,
  id: 'iec61000-2-2.lv',
  standard: 'IEC 61000-2-2',
  edition: '2:2002 (amendments of 2017 and 2018 add ranges above 2 kHz)',
  title: 'IEC 61000-2-2, compatibility levels, low voltage',
  tableRef: 'Table 1',
  appliesWhen: 'Public low-voltage networks, long-term effects',
  applicability: [
    {
      parameter: 'nominalV',
      upTo: 1000,
      otherwise: 'The compatibility levels of IEC 61000-2-2 are for public low-voltage networks, up to 1 kV',
    },
  ],
  orders: iec61000_2_2Orders,
  totals: [{ name: 'THD', limit: 8, maxOrder: 50 }],
  source: [
    'Public network-calculation source that restates IEC 61000-2-4 class 2, the same values up to small differences',
    'From memory: the values of order 21 and of the formulas',
  ],
  confidence: 'high',
  evidence: 'source',
  notes: [
    shortRecord,
    'A compatibility level is a reference value for coordination, not an emission limit of one apparatus.',
    'For very short effects (3 s) the standard multiplies each level by 1.3 + (0.7/45)(h - 5) and takes a THD of 11 %; that is not applied here.',
    checkEdition,
  ],
};
