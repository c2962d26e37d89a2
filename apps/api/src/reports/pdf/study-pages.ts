import type { ReportStage, ReportStudy, StudyResult } from '@overtally/contracts';
import { drawPanel } from './cover-page.js';
import { drawFacts, type Fact } from './facts.js';
import { formatFigure, formatGiven, formatMoment, formatPercent, formatQuantity } from './format.js';
import type { Sheet } from './sheet.js';
import { drawGainChart, drawHarmonicsChart } from './study-charts.js';
import { drawTable, type Cell } from './table.js';
import { colours, text, tinted } from './theme.js';
import { orderResultName, resultColour, resultName, stated, verdictInShort } from './words.js';

export const predictionWords = 'Prediction, not a measurement';

const cautions = [
  'The prediction holds for linear stages in the steady state and for a source that does not change when they are built in; saturation, heating and the reaction on the source are not part of it.',
  'Resonance: a filter with the supply behind it can amplify other orders than those it is meant for, and those of neighbouring loads.',
  'Capacitors hold dangerous energy after they are switched off; discharge them and check before touching.',
  'Ratings of coils, capacitors and resistors for current, voltage, heat and harmonics are for the designer to check.',
  'Local codes and the licensed practitioner decide on what may be built and connected.',
];

/** The pages of one study, beginning on a page of their own and marked as a prediction. */
export function drawStudy(sheet: Sheet, study: ReportStudy, index: number, count: number): void {
  sheet.newPage();
  sheet.group('Sect', () => {
    const words = `${study.number}  ${study.name}`;
    sheet.mark(`${words}: prediction`);
    sheet.paragraph(`Prediction ${index + 1} of ${count}`, text.kicker);
    sheet.paragraph(words, text.heading, 'H2');
    sheet.y += 6;
    drawMark(sheet);
    drawFacts(sheet, studyFacts(study));
    drawStages(sheet, study.stages);
    drawOutcome(sheet, study);
    drawHarmonicsChart(sheet, study);
    drawGainChart(sheet, study);
    drawOrders(sheet, study);
    drawWarnings(sheet, study.result);
  });
}

function drawMark(sheet: Sheet): void {
  const place = { x: sheet.left + 14, width: sheet.width - 14 };
  drawPanel(sheet, colours.near, () => {
    sheet.paragraph(predictionWords, tinted(text.strong, colours.near), 'P', place);
    const words =
      'What the stages below make of the harmonics that the study starts from, by calculation. Nothing behind the stages was measured.';
    sheet.paragraph(words, text.body, 'P', place);
  });
  sheet.y += 8;
}

function studyFacts(study: ReportStudy): Fact[] {
  const { inputQuantity, inputUnit, outputQuantity, outputUnit, result } = study;
  return [
    ['Starts from', study.source.words],
    [
      'Input and output',
      `${inputQuantity} in ${stated(inputUnit, 'no unit')}; ${outputQuantity} in ${stated(outputUnit, 'no unit')}`,
    ],
    ['Limits', study.limitSet?.title ?? 'none applied'],
    ['Assumptions', stated(study.assumptions, 'none stated')],
    ['Stability', `${result.stability.verdict}. ${result.stability.reason}`],
    ['Poles in 1/s', polesInWords(result), true],
    ...(study.spreadWords === null ? [] : [['Tolerances', study.spreadWords] satisfies Fact]),
    [
      'Saved',
      `version ${study.version}, ${formatMoment(study.savedAt)}, by ${study.author.name}; engine ${result.engineVersion}`,
    ],
  ];
}

const shownPoles = 12;

function polesInWords({ stability: { poles } }: StudyResult): string {
  if (poles.length === 0) return 'none';
  const words = poles.slice(0, shownPoles).map(({ re, im, multiplicity }) => {
    const times = multiplicity > 1 ? ` (${multiplicity} times)` : '';
    return `${formatFigure(re)}${im === 0 ? '' : ` ${im < 0 ? '−' : '+'} j${formatFigure(Math.abs(im))}`}${times}`;
  });
  return [...words, ...(poles.length > shownPoles ? [`and ${poles.length - shownPoles} more`] : [])].join(
    '; ',
  );
}

function drawStages(sheet: Sheet, stages: readonly ReportStage[]): void {
  sheet.heading('Stages', 60);
  if (stages.length === 0) {
    sheet.paragraph('None: the output is the input.', text.cell);
    return;
  }
  drawTable(
    sheet,
    [
      { header: 'Stage', share: 0.6 },
      { header: 'Name and kind', share: 2.6 },
      { header: 'Values, with their tolerances', share: 4.4 },
    ],
    stages.map((stage, index): Cell[] => [
      { text: String(index + 1), style: text.figure },
      { text: stageHead(stage) },
      { text: stageValues(stage) },
    ]),
  );
}

function stageHead({ name, kind, meaning, isOn }: ReportStage): string {
  return [
    name,
    ...(name === kind ? [] : [kind]),
    meaning,
    ...(isOn ? [] : ['OFF: lets everything through']),
  ].join('\n');
}

function stageValues({ values, words }: ReportStage): string {
  const lines = values.map(({ symbol, meaning, value, unit, tolerancePercent }) => {
    const tolerance = tolerancePercent === null ? '' : ` ± ${formatGiven(tolerancePercent)} %`;
    return `${symbol} = ${trimmed(formatQuantity(value, unit, 5))}${tolerance}, ${meaning}`;
  });
  return [...lines, ...(words === '' ? [] : [words])].join('\n') || 'none';
}

/** Zeros that say nothing of a value that was given: 22.000 µF becomes 22 µF. */
const trimmed = (quantity: string): string => quantity.replace(/(?:\.0+|(\.\d*?[1-9])0+)(?=\D|$)/, '$1');

/** Verdicts and figures before and behind the stages. */
function drawOutcome(sheet: Sheet, { result, inputUnit, outputUnit, thdMaxOrder }: ReportStudy): void {
  sheet.heading('Before and behind the stages', 100);
  for (const [side, verdict] of [
    ['Before', result.verdictBefore],
    ['Behind, predicted', result.verdictAfter],
  ] as const) {
    if (verdict === null) continue;
    const colour = resultColour(verdict.result);
    sheet.paragraph(
      `${side}: ${resultName(verdict.result)}, ${verdictInShort(verdict)}`,
      tinted(text.strong, colour),
    );
    sheet.paragraph(`${verdict.reason}. ${verdict.decisionRuleText}`.replace('..', '.'), text.soft);
    sheet.y += 3;
  }
  const { input, output } = result;
  if (output === null) {
    sheet.paragraph('There is no steady state, so there are no figures behind the stages.', text.strong);
  }
  const figures: [string, string, string][] = [
    ['rms', formatQuantity(input.rms, inputUnit), formatQuantity(output?.rms, outputUnit)],
    [
      'Fundamental, rms',
      formatQuantity(input.fundamentalRms, inputUnit),
      formatQuantity(output?.fundamentalRms, outputUnit),
    ],
    [`THD-F, orders 2 to ${thdMaxOrder}`, percent(input.thdF), percent(output?.thdF)],
    ['Crest factor', formatFigure(input.crestFactor), formatFigure(output?.crestFactor)],
  ];
  drawTable(
    sheet,
    [
      { header: 'Figure', share: 3 },
      { header: 'Before', share: 1.5, align: 'right' },
      { header: 'Behind, predicted', share: 1.5, align: 'right' },
    ],
    figures.map(([name, before, behind]): Cell[] => [
      { text: name },
      { text: before, style: text.figure },
      { text: behind, style: text.figure },
    ]),
  );
}

const percent = (ratio: number | null | undefined): string =>
  formatPercent(ratio === null || ratio === undefined ? null : 100 * ratio);

/** Every order before and behind, with the gain, the limit and what the tolerances make of it. */
function drawOrders(sheet: Sheet, { result, inputUnit, outputUnit }: ReportStudy): void {
  if (result.orders.length === 0) return;
  const judged = new Map(result.verdictAfter?.orders.map((entry) => [entry.order, entry]));
  const ranges = new Map(result.spread?.orders.map((range) => [range.order, range]));
  const figure = (content: string): Cell => ({ text: content, style: text.figure });
  sheet.heading('Orders, predicted', 90);
  drawTable(
    sheet,
    [
      { header: 'Order', share: 0.7, align: 'right' },
      { header: 'Before', share: 1.3, align: 'right' },
      { header: 'Behind,\npredicted', share: 1.3, align: 'right' },
      { header: 'Gain', share: 1, align: 'right' },
      { header: 'Limit', share: 1.2, align: 'right' },
      ...(result.spread === null
        ? []
        : [{ header: 'Least to most,\nby tolerances', share: 2.2, align: 'right' as const }]),
      { header: 'Predicted result', share: 1.6 },
    ],
    result.orders.map(({ order, inputRms, outputRms, gain }): Cell[] => {
      const entry = judged.get(order);
      const range = ranges.get(order);
      return [
        figure(String(order)),
        figure(formatQuantity(inputRms, inputUnit)),
        figure(formatQuantity(outputRms, outputUnit)),
        figure(formatFigure(gain)),
        figure(formatQuantity(entry?.limit, outputUnit)),
        ...(result.spread === null
          ? []
          : [
              figure(
                range
                  ? `${formatQuantity(range.min, outputUnit)} to ${formatQuantity(range.max, outputUnit)}`
                  : '–',
              ),
            ]),
        entry
          ? { text: orderResultName(entry.result), style: tinted(text.cell, resultColour(entry.result)) }
          : { text: 'not judged', style: tinted(text.cell, colours.inkSoft) },
      ];
    }),
    { rowHeight: 14.5, groupOf: 5 },
  );
  drawShare(sheet, result);
}

function drawShare(sheet: Sheet, { spread }: StudyResult): void {
  if (spread === null) return;
  const { sharePassing, worstOrder } = spread;
  const share =
    sharePassing === null ? '' : `${formatPercent(100 * sharePassing)} of the values tried meet the limits. `;
  const worst =
    worstOrder === null ? '' : `Order ${worstOrder} comes nearest to its limit, or exceeds it most.`;
  sheet.y += 6;
  sheet.paragraph(`${share}${worst}`, text.soft);
}

function drawWarnings(sheet: Sheet, { warnings }: StudyResult): void {
  if (warnings.length > 0) {
    sheet.heading('Orders near a resonance', 40);
    sheet.list(warnings.map(({ message }) => `${message}.`));
  }
  sheet.heading('Cautions on this prediction', 90);
  sheet.list(cautions);
}
