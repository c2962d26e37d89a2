import type { LimitEntry, LimitSet } from '@overtally/contracts';
import { byFormula, listed, ordersBetween, sorted } from './orders.js';
import { highMultiplesOfThree, notMultiplesOfThree, shortRecord, voltageShared } from './voltage.js';
import { checkEdition } from './wording.js';

const shared = {
  ...voltageShared,
  standard: 'IEC TR 61000-3-6',
  edition: '2:2008',
  tableRef: 'Table 2',
  evidence: 'source',
  source: [
    'HarmonicPowerModels.jl, library for optimal power flow, limit tables, https://github.com/timmyfaraday/HarmonicPowerModels.jl',
    'Public network-calculation source that restates IEC TR 61000-3-6',
  ],
  notes: [
    'Planning levels are indicative and set by the operator of the network; they are not limits.',
    'The two sources differ at order 8 by up to 0.03 %.',
    shortRecord,
    checkEdition,
  ],
} satisfies Partial<LimitSet>;

const even = (formula: string, limit: (n: number) => number): LimitEntry[] =>
  byFormula(ordersBetween(10, 50, 2), formula, limit);
const odd = (formula: string, limit: (n: number) => number): LimitEntry[] =>
  byFormula(notMultiplesOfThree(17), formula, limit);

/** IEC TR 61000-3-6:2008, Table 2: indicative planning levels, medium voltage, % of the fundamental. */
export const iec61000_3_6Mv: LimitSet = {
  ...shared,
  id: 'iec61000-3-6.mv',
  title: 'IEC TR 61000-3-6, planning levels, medium voltage',
  appliesWhen: 'Planning of medium-voltage networks, above 1 kV up to 35 kV',
  applicability: [
    {
      parameter: 'nominalV',
      above: 1000,
      upTo: 35_000,
      otherwise: 'These planning levels are for medium voltage, above 1 kV up to 35 kV',
    },
  ],
  orders: sorted(
    listed({ 2: 1.8, 3: 4, 4: 1, 5: 5, 6: 0.5, 7: 4, 8: 0.5, 9: 1.2, 11: 3, 13: 2.5, 15: 0.3, 21: 0.2 }),
    odd('1.9*(17/n)-0.2', (n) => 1.9 * (17 / n) - 0.2),
    highMultiplesOfThree(0.2),
    even('0.25*(10/n)+0.22', (n) => 0.25 * (10 / n) + 0.22),
  ),
  totals: [{ name: 'THD', limit: 6.5, maxOrder: 50 }],
  confidence: 'medium',
};

/** IEC TR 61000-3-6:2008, Table 2: indicative planning levels, high and extra-high voltage, % of the fundamental. */
export const iec61000_3_6Hv: LimitSet = {
  ...shared,
  id: 'iec61000-3-6.hv',
  title: 'IEC TR 61000-3-6, planning levels, high voltage',
  appliesWhen: 'Planning of high-voltage and extra-high-voltage networks, above 35 kV',
  applicability: [
    {
      parameter: 'nominalV',
      above: 35_000,
      otherwise: 'These planning levels are for high and extra-high voltage, above 35 kV',
    },
  ],
  orders: sorted(
    listed({ 2: 1.4, 3: 2, 4: 0.8, 5: 2, 6: 0.4, 7: 2, 8: 0.4, 9: 1, 11: 1.5, 13: 1.5, 15: 0.3, 21: 0.2 }),
    odd('1.2*(17/n)', (n) => 1.2 * (17 / n)),
    highMultiplesOfThree(0.2),
    even('0.19*(10/n)+0.16', (n) => 0.19 * (10 / n) + 0.16),
  ),
  totals: [{ name: 'THD', limit: 3, maxOrder: 50 }],
  confidence: 'high',
};
