import type { Applicability, LimitEntry, LimitSet } from '@overtally/contracts';
import { byFormula, listed, ordersBetween, sorted } from './orders.js';

const oddLowOrders = [
  { order: 3, amperes: 2.3, milliamperePerWatt: 3.4 },
  { order: 5, amperes: 1.14, milliamperePerWatt: 1.9 },
  { order: 7, amperes: 0.77, milliamperePerWatt: 1 },
  { order: 9, amperes: 0.4, milliamperePerWatt: 0.5 },
  { order: 11, amperes: 0.33, milliamperePerWatt: 0.35 },
  { order: 13, amperes: 0.21, milliamperePerWatt: 3.85 / 13 },
];
const oddFormulaOrders = ordersBetween(15, 39, 2);
const evenFormulaOrders = ordersBetween(8, 40, 2);

const classAOrders: LimitEntry[] = sorted(
  oddLowOrders.map(({ order, amperes }) => ({ order, limit: amperes })),
  byFormula(oddFormulaOrders, '0.15*15/n', (n) => (0.15 * 15) / n),
  listed({ 2: 1.08, 4: 0.43, 6: 0.3 }),
  byFormula(evenFormulaOrders, '0.23*8/n', (n) => (0.23 * 8) / n),
);

const timesOneAndAHalf = ({ formula, order, limit }: LimitEntry): LimitEntry => ({
  order,
  limit: 1.5 * limit,
  ...(formula === undefined ? {} : { formula: `1.5*(${formula})` }),
});

/** mA/W column of Table 3, without the cap in A of its other column. */
export const milliamperesPerWatt: LimitEntry[] = [
  ...oddLowOrders
    .filter(({ order }) => order < 13)
    .map(({ order, milliamperePerWatt }) => ({ order, limit: milliamperePerWatt })),
  ...byFormula(ordersBetween(13, 39, 2), '3.85/n', (n) => 3.85 / n),
];

const classDOrders: LimitEntry[] = milliamperesPerWatt.map((entry) => ({
  ...entry,
  capA: oddLowOrders.find(({ order }) => order === entry.order)?.amperes ?? (0.15 * 15) / entry.order,
}));

const noLimitsUpTo75W: Applicability = {
  parameter: 'powerW',
  above: 75,
  otherwise:
    'IEC 61000-3-2 has no limits for equipment with a rated power of 75 W or less, lighting excepted (clause 7)',
};

/** What the sets of IEC 61000-3-2 have in common. */
export const iec61000_3_2Shared = {
  projectId: null,
  version: 1,
  standard: 'IEC 61000-3-2',
  quantity: 'current',
  referenceParameter: null,
  procedure: 'iec61000-3-2',
  totals: [],
  source: [
    'Laboratory EMC report 1402CE13-01, page 34, which prints the limits of EN 61000-3-2 for classes A to D',
    'Assessment rules: from memory; the average, 150 %, POHC and disregard rules agree with page 19 of the user manual of a harmonic test system',
  ],
  confidence: 'high',
  evidence: 'source',
} satisfies Partial<LimitSet>;

export const checkEdition =
  'Check the values against your own copy of the edition that applies to the product.';
export const observation =
  'The average is over the whole record: it is that of the standard only when the record covers the observation period that the standard asks for.';
const noLimits =
  'No limits: rated power up to 75 W (lighting excepted), professional equipment above 1 kW, symmetrically controlled heating elements up to 200 W, independent dimmers for incandescent lamps up to 1 kW.';

/** IEC 61000-3-2, Table 1: limits for class A equipment, A rms per phase at 230 V. */
export const iec61000_3_2ClassA: LimitSet = {
  ...iec61000_3_2Shared,
  id: 'iec61000-3-2.classA',
  edition: '4:2014 and 5:2018+A1:2020 (A2:2024 not checked)',
  title: 'IEC 61000-3-2, class A',
  tableRef: 'Table 1',
  appliesWhen:
    'Equipment up to and including 16 A per phase that is not in class B, C or D; balanced three-phase equipment',
  unit: 'A',
  basis: 'absolute',
  parameters: [],
  applicability: [noLimitsUpTo75W],
  shortExcursion: true,
  orders: classAOrders,
  notes: [
    'Orders above 40 have no limit.',
    noLimits,
    'Single smoothed values between 150 % and 200 % are allowed when the time above 150 % is under 10 % of the observation and 10 min and the mean is below 90 %; where that time is not known, such an order is not decidable.',
    observation,
    checkEdition,
  ],
};

/** IEC 61000-3-2, 7.2: limits for class B equipment, 1.5 times Table 1. */
export const iec61000_3_2ClassB: LimitSet = {
  ...iec61000_3_2Shared,
  id: 'iec61000-3-2.classB',
  edition: '4:2014 and 5:2018+A1:2020',
  title: 'IEC 61000-3-2, class B',
  tableRef: '7.2 (1.5 times Table 1)',
  appliesWhen: 'Portable tools; arc welding equipment that is not professional equipment',
  unit: 'A',
  basis: 'absolute',
  parameters: [],
  applicability: [noLimitsUpTo75W],
  orders: classAOrders.map(timesOneAndAHalf),
  notes: [
    'Orders above 40 have no limit.',
    'The 200 % rule of class A does not apply.',
    observation,
    checkEdition,
  ],
};

/** IEC 61000-3-2, Table 3: limits for class D equipment, mA/W with a cap in A. */
export const iec61000_3_2ClassD: LimitSet = {
  ...iec61000_3_2Shared,
  id: 'iec61000-3-2.classD',
  edition: '4:2014 and 5:2018+A1:2020',
  title: 'IEC 61000-3-2, class D',
  tableRef: 'Table 3',
  appliesWhen:
    'Specified power above 75 W up to and including 600 W: personal computers and their monitors, television receivers; from edition 4 refrigerators and freezers with variable-speed compressor drives',
  unit: 'mA/W',
  basis: 'milliampere-per-watt',
  parameters: ['powerW'],
  applicability: [
    noLimitsUpTo75W,
    {
      parameter: 'powerW',
      upTo: 600,
      otherwise: 'Class D is for a specified power up to and including 600 W (clause 5); use class A',
    },
  ],
  orders: classDOrders,
  notes: [
    'Odd orders only. Both columns apply: the mA/W value times the power, never more than the cap in A.',
    'The power is the largest 1.5 s smoothed active input power, or a declared value within 10 % of it.',
    'The 200 % rule of class A does not apply.',
    observation,
    checkEdition,
  ],
};
