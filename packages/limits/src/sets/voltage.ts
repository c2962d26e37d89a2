import type { LimitEntry, LimitSet } from '@overtally/contracts';

const shortRecord =
  'The statistic of the standard is 95 % of the 10 min mean values of one week. A short record is a comparison with the values only, not a statement of conformity with the standard.';
const checkEdition = 'Check the values against your own copy of the edition that applies.';

const shared = {
  projectId: null,
  version: 1,
  quantity: 'voltage',
  unit: '%',
  basis: 'percent-of-fundamental',
  referenceParameter: null,
  procedure: 'plain',
  parameters: [],
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
  ...shared,
  id: 'en50160.lv',
  standard: 'EN 50160',
  edition: '2010 (values of the base text)',
  title: 'EN 50160, low-voltage supply',
  tableRef: 'Table 1',
  appliesWhen: 'Supply terminals of public low-voltage networks',
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

const iec61000_2_2Values: Readonly<Record<number, number>> = {
  2: 2,
  3: 5,
  4: 1,
  5: 6,
  6: 0.5,
  7: 5,
  8: 0.5,
  9: 1.5,
  11: 3.5,
  13: 3,
  15: 0.4,
  21: 0.3,
};

function iec61000_2_2Limit(order: number): number {
  const listed = iec61000_2_2Values[order];
  if (listed !== undefined) return listed;
  if (order % 2 === 0) return 0.25 * (10 / order) + 0.25;
  return order % 3 === 0 ? 0.2 : 2.27 * (17 / order) - 0.27;
}

/** IEC 61000-2-2:2002, Table 1: compatibility levels, low voltage, long-term effects, % of the fundamental. */
export const iec61000_2_2Lv: LimitSet = {
  ...shared,
  id: 'iec61000-2-2.lv',
  standard: 'IEC 61000-2-2',
  edition: '2:2002 (amendments of 2017 and 2018 add ranges above 2 kHz)',
  title: 'IEC 61000-2-2, compatibility levels, low voltage',
  tableRef: 'Table 1',
  appliesWhen: 'Public low-voltage networks, long-term effects',
  orders: Array.from({ length: 49 }, (_, i) => ({ order: i + 2, limit: iec61000_2_2Limit(i + 2) })),
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
