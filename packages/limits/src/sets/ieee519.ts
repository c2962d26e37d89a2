import type { LimitRow, LimitSet } from '@overtally/contracts';
import { ordersBetween } from './orders.js';
import { checkEdition } from './wording.js';

type Edition = '2014' | '2022';
type Bands = readonly [below11: number, below17: number, below23: number, below35: number, upTo50: number];
type Line = readonly [isc: number, bands: Bands, tdd: number];
interface Table {
  number: 2 | 3 | 4;
  where: string;
  range: { from?: number; above?: number; upTo?: number };
  lines: readonly Line[];
}

const highestOrder = 50;
const allOrders = ordersBetween(2, highestOrder, 1);

function bandLimit([below11, below17, below23, below35, upTo50]: Bands, order: number): number {
  if (order < 11) return below11;
  if (order < 17) return below17;
  if (order < 23) return below23;
  return order < 35 ? below35 : upTo50;
}

/** Even orders: a quarter of the band's limit in 2014; half of it up to 6 and all of it above in 2022. */
function evenShare(order: number, edition: Edition): number {
  if (order % 2 === 1) return 1;
  if (edition === '2014') return 0.25;
  return order <= 6 ? 0.5 : 1;
}

function rowsOf(lines: readonly Line[], edition: Edition): LimitRow[] {
  return lines.map(([from, bands, tdd], i): LimitRow => {
    const below = lines[i + 1]?.[0];
    const upper = below === undefined ? '' : ` to below ${below}`;
    return {
      label: from === 0 ? `Isc/IL below ${below ?? ''}` : `Isc/IL from ${from}${upper}`,
      selector: { parameter: 'iscOverIl', from, ...(below === undefined ? {} : { below }) },
      orders: allOrders.map((order) => {
        const share = evenShare(order, edition);
        const formula = share === 1 ? {} : { formula: `${100 * share} % of the limit of the band` };
        return { order, limit: share * bandLimit(bands, order), ...formula };
      }),
      totals: [{ name: 'TDD', limit: tdd, maxOrder: highestOrder }],
    };
  });
}

const tables: readonly Table[] = [
  {
    number: 2,
    where: '120 V to 69 kV',
    range: { from: 120, upTo: 69_000 },
    lines: [
      [0, [4, 2, 1.5, 0.6, 0.3], 5],
      [20, [7, 3.5, 2.5, 1, 0.5], 8],
      [50, [10, 4.5, 4, 1.5, 0.7], 12],
      [100, [12, 5.5, 5, 2, 1], 15],
      [1000, [15, 7, 6, 2.5, 1.4], 20],
    ],
  },
  {
    number: 3,
    where: 'above 69 kV to 161 kV',
    range: { above: 69_000, upTo: 161_000 },
    lines: [
      [0, [2, 1, 0.75, 0.3, 0.15], 2.5],
      [20, [3.5, 1.75, 1.25, 0.5, 0.25], 4],
      [50, [5, 2.25, 2, 0.75, 0.35], 6],
      [100, [6, 2.75, 2.5, 1, 0.5], 7.5],
      [1000, [7.5, 3.5, 3, 1.25, 0.7], 10],
    ],
  },
  {
    number: 4,
    where: 'above 161 kV',
    range: { above: 161_000 },
    lines: [
      [0, [1, 0.5, 0.38, 0.15, 0.1], 1.5],
      [25, [2, 1, 0.75, 0.3, 0.15], 2.5],
      [50, [3, 1.5, 1.15, 0.45, 0.22], 3.75],
    ],
  },
];

const restated = 'Public network-calculation source that restates Tables 1 to 4 of IEEE 519-2014';
const library =
  'HarmonicPowerModels.jl, library for optimal power flow, limit tables, https://github.com/timmyfaraday/HarmonicPowerModels.jl';
const textbook =
  'Power Quality in Electrical Systems, page 17, table of IEEE 519-1992, https://digilib.universitaspertamina.ac.id/ebook/Power%20Quality%20in%20Electrical%20Systems/files/basic-html/page34.html';
const whitePaper = 'Hoevenaars, white paper on applying IEEE 519-2014: Tables 1 and 2 and the definitions';
const changes =
  'Note on the changes of IEEE 519-2022: the rule of even orders, https://studylib.net/doc/27451673/694587756-updates-of-ieee-519-2022-than-ieee-519-2014';

const sourcesOfTable: Readonly<Record<Table['number'], string[]>> = {
  2: [textbook, whitePaper, library, restated],
  3: [library, restated],
  4: [restated],
};

const evenNotes: Readonly<Record<Edition, string>> = {
  '2014': 'Even orders are limited to 25 % of the limit of their band.',
  '2022': 'Even orders up to 6 are limited to 50 % of the limit of their band, those above to all of it.',
};

const currentStatistic =
  'IEEE 519 takes the 99th percentile of 3 s values of a day (within 2 times the limit) and the 99th and 95th of 10 min values of a week (within 1.5 times and once the limit); a short record is compared with the values, which states no conformity';

const currentNotes = [
  'IL is the maximum demand load current at the point of common coupling, fundamental: the mean of the monthly maximum demands of the last 12 months. The limits hold there, for the whole installation and not for one machine.',
  'The lower end of a row of Isc/IL is taken as inside, the upper as outside; the print of 2014 shows <20, 20<50, and so on to >1000.',
  'Facilities that generate power use the row of the lowest Isc/IL whatever the ratio, unless another standard covers them.',
  'Distortion that makes a DC offset, such as that of half-wave converters, is not allowed.',
  'If the low orders are held to 25 % of their limits the others may be multiplied (5 and 7: 1.4; 5 to 13: 1.7; 5 to 19: 2.0; 5 to 25: 2.2); that is not applied here.',
];

function currentSet({ number, where, range, lines }: Table, edition: Edition): LimitSet {
  const isUnsure = number === 4 && edition === '2022';
  return {
    id: `ieee519-${edition}.table${number}`,
    projectId: null,
    version: 1,
    standard: 'IEEE 519',
    edition,
    title: `IEEE 519-${edition}, current, ${where}`,
    tableRef: `Table ${number}`,
    appliesWhen: `Point of common coupling rated ${where}`,
    quantity: 'current',
    unit: '%',
    basis: 'percent-of-reference',
    referenceParameter: 'ilA',
    procedure: 'plain',
    parameters: ['iscOverIl', 'ilA'],
    applicability: [
      {
        parameter: 'nominalV',
        ...range,
        otherwise: `Table ${number} of IEEE 519 is for a point of common coupling rated ${where}`,
      },
    ],
    rowChoice: 'range',
    rows: rowsOf(lines, edition),
    orders: [],
    totals: [],
    statistic: currentStatistic,
    source: [...sourcesOfTable[number], ...(edition === '2022' ? [changes] : [])],
    confidence: isUnsure ? 'medium' : 'high',
    evidence: isUnsure ? 'source_partial' : 'source',
    notes: [
      ...(isUnsure
        ? ['The source prints these values for the edition of 2014; that 2022 keeps them is from memory.']
        : []),
      evenNotes[edition],
      ...currentNotes,
      checkEdition,
    ],
  };
}

/** IEEE 519, Tables 2 to 4 of both editions: current distortion at the point of common coupling, % of IL. */
export const ieee519Current: LimitSet[] = (['2014', '2022'] as const).flatMap((edition) =>
  tables.map((table) => currentSet(table, edition)),
);

function voltageRow(
  label: string,
  range: { above?: number; upTo?: number },
  order: number,
  thd: number,
): LimitRow {
  return {
    label,
    selector: { parameter: 'nominalV', ...range },
    orders: allOrders.map((each) => ({ order: each, limit: order })),
    totals: [{ name: 'THD', limit: thd, maxOrder: highestOrder, basis: 'percent-of-reference' }],
  };
}

/** IEEE 519-2014 and -2022, Table 1: voltage distortion at the point of common coupling, % of the rated voltage. */
export const ieee519Voltage: LimitSet = {
  id: 'ieee519.voltage',
  projectId: null,
  version: 1,
  standard: 'IEEE 519',
  edition: '2014 and 2022',
  title: 'IEEE 519, voltage',
  tableRef: 'Table 1',
  appliesWhen: 'Line-to-neutral voltage at the point of common coupling',
  quantity: 'voltage',
  unit: '%',
  basis: 'percent-of-reference',
  referenceParameter: 'nominalV',
  procedure: 'plain',
  parameters: ['nominalV'],
  rowChoice: 'range',
  rows: [
    voltageRow('1 kV or less', { upTo: 1000 }, 5, 8),
    voltageRow('above 1 kV to 69 kV', { above: 1000, upTo: 69_000 }, 3, 5),
    voltageRow('above 69 kV to 161 kV', { above: 69_000, upTo: 161_000 }, 1.5, 2.5),
    voltageRow('above 161 kV', { above: 161_000 }, 1, 1.5),
  ],
  orders: [],
  totals: [],
  statistic:
    'IEEE 519 takes the 99th percentile of 3 s values of a day (within 1.5 times the limit) and the 95th of 10 min values of a week (within the limit); a short record is compared with the values, which states no conformity',
  source: [whitePaper, library, restated],
  confidence: 'high',
  evidence: 'source',
  notes: [
    'Orders and THD are in percent of the rated voltage at the point of common coupling. The rated voltage is given between lines; for a channel from line to neutral it is divided by the root of 3.',
    'Above 161 kV a THD of 2.0 % may be allowed where an HVDC terminal is the cause and its effect has died away where other users may connect (from memory).',
    checkEdition,
  ],
};
