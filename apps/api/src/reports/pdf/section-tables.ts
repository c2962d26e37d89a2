import type {
  CalibrationState,
  InstrumentRef,
  RepeatOrder,
  ReportSection,
  SupplyVerdict,
} from '@overtally/contracts';
import type { Fact } from './facts.js';
import { drawFacts } from './facts.js';
import { formatDay, formatGiven, formatPercent, formatQuantity } from './format.js';
import type { Sheet } from './sheet.js';
import { drawTable, type Cell, type Column } from './table.js';
import { colours, text, tinted } from './theme.js';
import { notStated, resultColour, resultName, stated } from './words.js';

const stateNames: Record<CalibrationState, string> = {
  valid: 'valid',
  overdue: 'OVERDUE',
  none: 'NOT CALIBRATED',
};

/** The measuring chain with each instrument's calibration as it stood when the recording was captured. */
export function drawChain(sheet: Sheet, { chain, recording }: ReportSection): void {
  sheet.heading('Measuring chain and calibration', 60);
  if (chain === null) {
    drawFacts(sheet, [
      ['Measuring chain', stated(recording.measuringChain)],
      ['Instrument', stated(recording.instrument)],
      ['Calibration', 'not stated: no chain with calibrations is named for this recording'],
    ]);
    return;
  }
  sheet.paragraph(chain.name, text.strong);
  if (chain.description.trim() !== '') sheet.paragraph(chain.description, text.cell);
  sheet.y += 4;
  drawTable(
    sheet,
    [
      { header: 'Instrument', share: 2.5 },
      { header: 'Serial no.', share: 1.2 },
      { header: 'Certificate', share: 1.9 },
      { header: 'Calibrated', share: 1.2 },
      { header: 'Due', share: 1.2 },
      { header: 'At capture', share: 1.4 },
    ],
    chain.instruments.map(instrumentRow),
  );
}

function instrumentRow(instrument: InstrumentRef): Cell[] {
  const { calibration, calibrationState: state } = instrument;
  const maker = [instrument.manufacturer, instrument.model].filter((part) => part !== '').join(' ');
  const certificate =
    calibration === null
      ? 'none'
      : [
          stated(calibration.certificateNumber, 'number not stated'),
          calibration.calibratedBy,
          calibration.uncertainty === '' ? '' : `U: ${calibration.uncertainty}`,
        ]
          .filter((part) => part !== '')
          .join('\n');
  return [
    { text: maker === '' ? instrument.name : `${instrument.name}\n${maker}` },
    { text: instrument.serialNumber, style: text.figure },
    { text: certificate },
    { text: calibration === null ? notStated : formatDay(calibration.calibratedOn) },
    { text: calibration === null ? notStated : formatDay(calibration.dueOn) },
    {
      text: stateNames[state],
      style: state === 'valid' ? tinted(text.cell, colours.within) : tinted(text.cellStrong, colours.over),
    },
  ];
}

/** Conditions of the test and the mode the equipment ran in (7.8.3.1 a). */
export function drawConditions(sheet: Sheet, { conditions, operatingMode, equipment }: ReportSection): void {
  const figure = (value: number | undefined, unit: string): string =>
    value === undefined ? notStated : `${formatGiven(value)}\u00a0${unit}`;
  const mode =
    operatingMode === null
      ? notStated
      : [operatingMode.name, operatingMode.description].filter((part) => part !== '').join('\n');
  const facts: Fact[] = [
    ['Operating mode', mode],
    ['Condition of the item', stated(equipment?.remark ?? '')],
    [
      'Ambient',
      `${figure(conditions.ambientTemperatureC, '°C')}; relative humidity ${figure(conditions.relativeHumidityPercent, '%')}`,
    ],
    [
      'Supply',
      `${figure(conditions.supplyVoltageV, 'V')}, ${figure(conditions.supplyFrequencyHz, 'Hz')}; ${stated(conditions.supply ?? '', 'source not stated')}`,
    ],
    ['Place', stated(conditions.place ?? '')],
    ...(conditions.remark ? [['Remark', conditions.remark] satisfies Fact] : []),
  ];
  sheet.heading('Test conditions', 60);
  drawFacts(sheet, facts);
}

const supplyResults: Record<SupplyVerdict['result'], string> = {
  pass: 'meets',
  fail: 'does not meet',
  'not-decidable': 'is not known to meet',
};

/** The test voltage against what the standard asks of the supply. */
export function drawSupply(sheet: Sheet, { verdict: { supply } }: ReportSection): void {
  if (supply === null) return;
  const { channelName, nominalV, frequencyHz } = supply;
  sheet.heading('Test supply', 70);
  sheet.paragraph(
    `${channelName} ${supplyResults[supply.result]} what the standard asks of a supply of ${formatGiven(nominalV)} V, ${formatGiven(frequencyHz)} Hz.`,
    tinted(text.strong, resultColour(supply.result)),
  );
  if (supply.assumption) sheet.paragraph(`${supply.assumption.replace(/\.$/, '')}.`, text.soft);
  sheet.y += 4;
  const bound = (value: number | null, unit: string): string =>
    value === null ? '–' : formatQuantity(value, unit);
  drawTable(
    sheet,
    [
      { header: 'Requirement', share: 3 },
      { header: 'Measured', share: 1.3, align: 'right' },
      { header: 'From', share: 1.2, align: 'right' },
      { header: 'Up to', share: 1.2, align: 'right' },
      { header: 'Result', share: 1.4 },
    ],
    supply.checks.map(({ name, unit, value, from, upTo, result }): Cell[] => [
      { text: name },
      { text: bound(value, unit), style: text.figure },
      { text: bound(from, unit), style: text.figure },
      { text: bound(upTo, unit), style: text.figure },
      {
        text: result === 'pass' ? 'met' : result === 'fail' ? 'not met' : 'not decidable',
        style: tinted(result === 'pass' ? text.cell : text.cellStrong, resultColour(result)),
      },
    ]),
  );
}

const repeatableWords = new Map<boolean | null, string>([
  [true, 'The repeats agree within the repeatability that the standard asks for.'],
  [false, 'The repeats do not agree within the repeatability that the standard asks for.'],
  [null, 'The standard of the limits states no repeatability to hold the repeats to.'],
]);

/** The repeats a verdict is made of, and how far they lie apart. */
export function drawRepeats(sheet: Sheet, { verdict }: ReportSection): void {
  const { repeats, repeatability } = verdict;
  if (repeats.length === 0) return;
  sheet.heading('Repeats', 70);
  sheet.paragraph(
    `The verdict is made over ${repeats.length} repeats. ${repeatableWords.get(repeatability?.isRepeatable ?? null) ?? ''}`,
  );
  sheet.y += 4;
  drawTable(
    sheet,
    [
      { header: 'Repeat', share: 0.7 },
      { header: 'Recording', share: 1.2 },
      { header: 'Result', share: 1.6 },
      { header: 'Reason', share: 5 },
    ],
    repeats.map(({ recordingNumber, result, reason }, index): Cell[] => [
      { text: String(index + 1), style: text.figure },
      { text: recordingNumber, style: text.figure },
      { text: resultName(result), style: tinted(text.cellStrong, resultColour(result)) },
      { text: reason },
    ]),
  );
  if (repeatability === null || repeatability.orders.length === 0) return;
  sheet.y += 8;
  drawSpread(sheet, repeatability.orders);
}

/** Spread per order, in two halves side by side. */
function drawSpread(sheet: Sheet, orders: readonly RepeatOrder[]): void {
  const head: Column[] = [
    { header: 'Order', share: 0.8, align: 'right' },
    { header: 'Repeats', share: 0.9, align: 'right' },
    { header: 'Standard deviation,\nof the limit', share: 1.6, align: 'right' },
    { header: 'Furthest from the\nmean, of the limit', share: 1.6, align: 'right' },
  ];
  const cells = (spread: RepeatOrder | undefined): Cell[] => {
    if (spread === undefined) return head.map(() => ({ text: '' }));
    const { order, count, repeatabilityPercent, deviationPercent } = spread;
    return [
      String(order),
      String(count),
      formatPercent(repeatabilityPercent),
      formatPercent(deviationPercent),
    ].map((words) => ({ text: words, style: text.figure }));
  };
  const half = Math.ceil(orders.length / 2);
  const rows = orders
    .slice(0, half)
    .map((spread, index) => [...cells(spread), ...cells(orders[half + index])]);
  drawTable(sheet, [...head, ...head], rows, { rowHeight: 14.5, groupOf: 5 });
}
