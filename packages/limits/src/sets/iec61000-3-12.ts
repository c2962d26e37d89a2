import type { LimitEntry, LimitRow, LimitSet } from '@overtally/contracts';
import { byFormula, ordersBetween, sorted } from './orders.js';
import { checkEdition } from './wording.js';

/** Even orders up to 12 have the same limits in every table. */
const evenOrders: LimitEntry[] = byFormula(ordersBetween(2, 12, 2), '16/n', (n) => 16 / n);

type Line = readonly [rsce: number, limits: readonly number[], thc: number, pwhc: number];

function rowsOf(orders: readonly number[], lines: readonly Line[]): LimitRow[] {
  return lines.map(([rsce, limits, thc, pwhc], i) => {
    const next = lines[i + 1]?.[0];
    return {
      label: `Rsce ${rsce}`,
      selector: { parameter: 'rsce', from: rsce, ...(next === undefined ? {} : { below: next }) },
      orders: sorted(
        orders.map((order, at) => ({ order, limit: limits[at] ?? NaN })),
        evenOrders,
      ),
      totals: [
        { name: 'THC', limit: thc, maxOrder: 40 },
        { name: 'PWHC', limit: pwhc, maxOrder: 40 },
      ],
    };
  });
}

const shared = {
  projectId: null,
  version: 1,
  standard: 'IEC 61000-3-12',
  edition: '2:2011 (amendment 1:2021 not checked)',
  quantity: 'current',
  unit: '%',
  basis: 'percent-of-reference',
  referenceParameter: 'irefA',
  procedure: 'iec61000-3-12',
  parameters: ['rsce', 'irefA'],
  rowChoice: 'interpolate',
  applicability: [
    {
      parameter: 'irefA',
      above: 16,
      upTo: 75,
      otherwise: 'IEC 61000-3-12 is for an input current above 16 A up to and including 75 A per phase',
    },
    {
      parameter: 'rsce',
      from: 33,
      otherwise: 'The tables begin at a short-circuit ratio Rsce of 33; below it they give no limits',
    },
  ],
  orders: [],
  totals: [],
} satisfies Partial<LimitSet>;

const notes = [
  'Rsce = Ssc / (3 Sequ) for single-phase, Ssc / (2 Sequ) for interphase, Ssc / Sequ for three-phase equipment. Between two rows the limits are interpolated linearly.',
  'Equipment that meets the row Rsce = 33 needs no condition of connection; otherwise the maker states the least Ssc.',
  'Mean of the 1.5 s smoothed values against the limit, single smoothed values within 150 %; currents below 1 % of Iref are ignored order by order (of medium confidence); a total that is over its limit only with them is not decidable.',
  'Even orders above 12 count in THC and PWHC only.',
  checkEdition,
];

const conditionsSource =
  'Extract of IEC 61000-3-12:2011 with conditions a) to f), https://www.mealir.com/iec-61000-3-12-2011-pdf-electromagnetic-compatibilityemc-part-3-12-limits-limits-for-harmonic-currents-produced-by-equipment-connected-to-public-low-voltage-systems-with-input-current-16-a-an.html/';
const memory = 'From memory: the numbers';

/** IEC 61000-3-12:2011, Table 2: equipment that is not balanced three-phase, % of Iref. */
export const iec61000_3_12Table2: LimitSet = {
  ...shared,
  id: 'iec61000-3-12.table2',
  title: 'IEC 61000-3-12, not balanced three-phase',
  tableRef: 'Table 2',
  appliesWhen:
    'Above 16 A up to 75 A per phase: single-phase, interphase and unbalanced three-phase equipment',
  rows: rowsOf(
    [3, 5, 7, 9, 11, 13],
    [
      [33, [21.6, 10.7, 7.2, 3.8, 3.1, 2], 23, 23],
      [66, [24, 13, 8, 5, 4, 3], 26, 26],
      [120, [27, 15, 10, 6, 5, 4], 30, 30],
      [250, [35, 20, 13, 9, 8, 6], 40, 40],
      [350, [41, 24, 15, 12, 10, 8], 47, 47],
    ],
  ),
  source: [memory],
  confidence: 'high',
  evidence: 'memory_and_arithmetic',
  notes: [
    'The row Rsce = 33 equals 1.5 times the amperes of IEC 61000-3-2, class A, over 16 A; the other rows are from memory.',
    ...notes,
  ],
};

/** IEC 61000-3-12:2011, Table 3: balanced three-phase equipment, % of Iref. */
export const iec61000_3_12Table3: LimitSet = {
  ...shared,
  id: 'iec61000-3-12.table3',
  title: 'IEC 61000-3-12, balanced three-phase',
  tableRef: 'Table 3',
  appliesWhen: 'Above 16 A up to 75 A per phase: balanced three-phase equipment',
  rows: rowsOf(
    [5, 7, 11, 13],
    [
      [33, [10.7, 7.2, 3.1, 2], 13, 22],
      [66, [14, 9, 5, 3], 16, 25],
      [120, [19, 12, 7, 4], 22, 28],
      [250, [31, 20, 12, 7], 37, 38],
      [350, [40, 25, 15, 10], 48, 46],
    ],
  ),
  source: [memory],
  confidence: 'high',
  evidence: 'memory_and_arithmetic',
  notes: [
    'The individual limits of the row Rsce = 33 equal 1.5 times the amperes of IEC 61000-3-2, class A, over 16 A; the other rows are from memory.',
    ...notes,
  ],
};

/** IEC 61000-3-12:2011, Table 4: balanced three-phase equipment under conditions a), b) or c), % of Iref. */
export const iec61000_3_12Table4: LimitSet = {
  ...shared,
  id: 'iec61000-3-12.table4',
  title: 'IEC 61000-3-12, balanced three-phase under a), b) or c)',
  tableRef: 'Table 4',
  appliesWhen:
    'Balanced three-phase equipment under one of: a) I5 and I7 each below 5 % of Iref during the whole test; b) the phase of I5 has no preferred value and takes any in 0° to 360°; c) the phase of I5 against the fundamental phase-to-neutral voltage is within 90° to 150° during the whole test',
  rows: rowsOf(
    [5, 7, 11, 13],
    [
      [33, [10.7, 7.2, 3.1, 2], 13, 22],
      [120, [40, 25, 15, 10], 48, 46],
    ],
  ),
  source: [conditionsSource, memory],
  confidence: 'high',
  evidence: 'source_partial',
  notes: ['Whether a), b) or c) holds is not checked here: state it.', ...notes],
};

/** IEC 61000-3-12:2011, Table 5: balanced three-phase equipment under conditions d), e) or f), % of Iref. */
export const iec61000_3_12Table5: LimitSet = {
  ...shared,
  id: 'iec61000-3-12.table5',
  title: 'IEC 61000-3-12, balanced three-phase under d), e) or f)',
  tableRef: 'Table 5',
  appliesWhen:
    'Balanced three-phase equipment under one of: d) I5 and I7 each below 3 % of Iref during the whole test; e) the phase of I5 has no preferred value and takes any in 0° to 360°; f) the phase of I5 against the fundamental phase-to-neutral voltage is within 150° to 210° during the whole test',
  rows: rowsOf(
    [5, 7, 11, 13, 17, 19, 23, 25, 29, 31, 35, 37],
    [
      [33, [10.7, 7.2, 3.1, 2, 2, 1.5, 1.5, 1.5, 1, 1, 1, 1], 13, 22],
      [250, [25, 17.3, 12.1, 10.7, 8.4, 7.8, 6.8, 6.5, 5.4, 5.2, 4.9, 4.7], 35, 70],
    ],
  ),
  source: [conditionsSource, memory],
  confidence: 'medium',
  evidence: 'source_partial',
  notes: ['Whether d), e) or f) holds is not checked here: state it.', ...notes],
};
