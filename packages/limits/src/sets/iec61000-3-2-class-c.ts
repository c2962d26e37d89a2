import type { LimitEntry, LimitRow, LimitSet, WaveformCondition } from '@overtally/contracts';
import { checkEdition, iec61000_3_2Shared, milliamperesPerWatt, observation } from './iec61000-3-2.js';
import { listed, ordersBetween } from './orders.js';

const shared = {
  ...iec61000_3_2Shared,
  unit: '%',
  basis: 'percent-of-fundamental',
} satisfies Partial<LimitSet>;

const above25W = {
  parameter: 'powerW',
  above: 25,
  otherwise: 'This table is for lighting equipment above 25 W; use the set for 25 W or less',
} as const;

/** Table 2: order 3 differs between the editions; even orders above 2 have no limit. */
const table2 = (third: LimitEntry): LimitEntry[] => [
  { order: 2, limit: 2 },
  third,
  ...listed({ 5: 10, 7: 7, 9: 5 }),
  ...ordersBetween(11, 39, 2).map((order) => ({ order, limit: 3 })),
];

const noShortExcursion = 'The 200 % rule of class A does not apply.';

/** IEC 61000-3-2 edition 4, Table 2: lighting equipment above 25 W, % of the fundamental current. */
export const classCAbove25WEdition4: LimitSet = {
  ...shared,
  id: 'iec61000-3-2.classC.gt25W.ed4',
  edition: '4:2014 (and 5:2018 before A1, see notes)',
  title: 'IEC 61000-3-2, class C above 25 W, edition 4',
  tableRef: 'Table 2',
  appliesWhen: 'Lighting equipment with an active input power above 25 W',
  parameters: ['powerFactor'],
  applicability: [above25W],
  orders: table2({ order: 3, limit: 30, timesParameter: 'powerFactor', formula: '30*lambda' }),
  notes: [
    'Even orders above 2 have no limit.',
    'Lambda is the circuit power factor P/S measured on the equipment; it may be declared within 10 % of that.',
    noShortExcursion,
    observation,
    checkEdition,
  ],
};

/** IEC 61000-3-2 edition 5.1, Table 2: lighting equipment above 25 W, % of the fundamental current. */
export const classCAbove25WEdition5: LimitSet = {
  ...shared,
  id: 'iec61000-3-2.classC.gt25W.ed5',
  edition: '5.1 (2018+A1:2020)',
  title: 'IEC 61000-3-2, class C above 25 W, edition 5.1',
  tableRef: 'Table 2',
  appliesWhen: 'Lighting equipment with a rated power above 25 W',
  parameters: [],
  applicability: [above25W],
  orders: table2({ order: 3, limit: 27 }),
  source: ['From memory'],
  confidence: 'medium',
  evidence: 'memory',
  notes: [
    'Order 3 is fixed at 27 %: 30 times a power factor of 0.90, which modern lighting reaches.',
    'Whether 27 % came with edition 5.0 or with A1:2020 is not certain: check before use.',
    'Even orders above 2 have no limit.',
    noShortExcursion,
    observation,
    checkEdition,
  ],
};

const perWatt: LimitRow = {
  label: 'alternative 1 (mA/W of Table 3)',
  basis: 'milliampere-per-watt',
  unit: 'mA/W',
  orders: milliamperesPerWatt,
  totals: [],
};

const byShape = (waveform: WaveformCondition): LimitRow => ({
  label: 'alternative 2 (orders 3 and 5 and the shape of the current)',
  orders: listed({ 3: 86, 5: 61 }),
  totals: [],
  waveform,
});

const angles = { startsByDeg: 60, peakByDeg: 65, endsNotBeforeDeg: 90 };

/** IEC 61000-3-2 edition 4, 7.3 b): discharge lighting of 25 W or less, one of two alternatives. */
export const classCUpTo25WEdition4: LimitSet = {
  ...shared,
  id: 'iec61000-3-2.classC.le25W.ed4',
  edition: '4:2014',
  title: 'IEC 61000-3-2, class C up to 25 W, edition 4',
  tableRef: '7.3 b)',
  appliesWhen: 'Discharge lighting equipment with an active input power of 25 W or less',
  parameters: ['powerW'],
  applicability: [
    {
      parameter: 'powerW',
      upTo: 25,
      otherwise: 'These alternatives are for lighting equipment of 25 W or less; use the set above 25 W',
    },
  ],
  rowChoice: 'alternative',
  rows: [
    perWatt,
    byShape({
      ...angles,
      how: 'The current starts to flow, has its last peak and stops, counted from the zero crossing of the fundamental supply voltage',
    }),
  ],
  orders: [],
  source: [
    'IEEE EMC Society, product safety mailing list: the condition on the shape, quoted, https://www.mail-archive.com/emc-pstc@listserv.ieee.org/msg15628.html',
    'From memory: the percentages',
  ],
  evidence: 'source_partial',
  notes: [
    'One alternative is enough. The mA/W column is taken without the cap in A.',
    noShortExcursion,
    observation,
    checkEdition,
  ],
};

/** IEC 61000-3-2 edition 5, 7.4.3: lighting equipment from 5 W to 25 W, one of three alternatives. */
export const classC5To25WEdition5: LimitSet = {
  ...shared,
  id: 'iec61000-3-2.classC.5to25W.ed5',
  edition: '5:2018 (+A1:2020)',
  title: 'IEC 61000-3-2, class C from 5 W to 25 W, edition 5',
  tableRef: '7.4.3',
  appliesWhen: 'Lighting equipment with a rated power from 5 W to 25 W',
  parameters: ['powerW'],
  applicability: [
    {
      parameter: 'powerW',
      from: 5,
      otherwise: 'Edition 5 has no limits for lighting equipment with a rated power below 5 W (clause 7)',
    },
    {
      parameter: 'powerW',
      upTo: 25,
      otherwise: 'These alternatives are for lighting equipment from 5 W to 25 W; use the set above 25 W',
    },
  ],
  rowChoice: 'alternative',
  rows: [
    perWatt,
    byShape({
      ...angles,
      how: 'The current reaches and falls below 5 % of the highest absolute peak of the window, read in the cycle that holds that peak, without content above 9 kHz',
    }),
    {
      label: 'alternative 3 (THD and orders 2 to 11)',
      orders: listed({ 2: 5, 3: 35, 5: 25, 7: 30, 9: 20, 11: 20 }),
      totals: [{ name: 'THD', limit: 70, maxOrder: 40 }],
    },
  ],
  orders: [],
  source: [
    'List of changes of edition 5 on a page of a test house: the floor of 5 W, https://www.dlsemc.com/iec-61000-3-2-limits-for-harmonic-current-emissions-equipment-input-current-%E2%89%A4-16-a-per-phase',
    'From memory: the percentages',
  ],
  confidence: 'medium',
  evidence: 'source_partial',
  notes: ['One alternative is enough.', noShortExcursion, observation, checkEdition],
};
