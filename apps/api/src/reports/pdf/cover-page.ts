import type { Report, ReportSection, ReportStudy } from '@overtally/contracts';
import { formatDate } from './format.js';
import type { Sheet } from './sheet.js';
import { drawTable } from './table.js';
import { drawTallyStrip } from './tally-strip.js';
import { drawTitleBlock } from './title-block.js';
import { boldLine, colours, text, tinted } from './theme.js';
import { itemsUnderTest, placesOf, receivedDates, testDates } from './items.js';
import {
  laboratoryName,
  notStated,
  overallSentence,
  resultColour,
  resultName,
  statusName,
  stated,
  verdictInShort,
} from './words.js';

/** First page: what was judged, for whom, with which result, by which rule. */
export function drawCoverPage(sheet: Sheet, report: Report): void {
  drawLaboratory(sheet, report);
  sheet.paragraph('Harmonic test report', text.kicker);
  sheet.y += 2;
  sheet.mark(report.title);
  sheet.paragraph(report.title, text.title, 'H1');
  sheet.y += 10;
  drawReportBlock(sheet, report);
  drawReplaced(sheet, report);
  drawResult(sheet, report);
  if (report.summary.trim() !== '') {
    sheet.heading('Summary', 30, 'H2');
    sheet.paragraph(report.summary);
  }
  if (report.content.sections.length > 0) {
    drawJudgedRecordings(sheet, report.content.sections);
    drawDecisionRules(sheet, report.content.sections);
  }
  drawPredictions(sheet, report.content.studies);
}

function drawLaboratory(sheet: Sheet, { content }: Report): void {
  const { address, contact } = content.laboratory;
  sheet.y = 34;
  sheet.paragraph(laboratoryName(content), { ...text.heading, size: 13 }, 'P', { width: sheet.width - 120 });
  sheet.y += 1;
  const lines = [stated(address, 'Address not stated'), stated(contact, 'Contact not stated')];
  sheet.paragraph(lines.join('\n'), text.soft, 'P', { width: sheet.width - 120 });
  sheet.y = Math.max(sheet.y + 8, 80);
  sheet.rule(sheet.y, boldLine, colours.ink);
  sheet.y += 16;
}

function drawReportBlock(sheet: Sheet, report: Report): void {
  const { project, sections } = report.content;
  drawTitleBlock(sheet, [
    [
      {
        caption: 'Report',
        value: report.number ?? 'given when issued',
        mono: report.number !== null,
        strong: true,
        share: 1.3,
      },
      { caption: 'Revision', value: String(report.revision), mono: true, strong: true, share: 0.7 },
      { caption: 'Status', value: statusName(report.status === 'superseded' ? 'issued' : report.status) },
      { caption: 'Date of issue', value: formatDate(report.issuedAt) },
    ],
    [
      { caption: 'Customer', value: stated(project.customer), share: 1 },
      { caption: 'Customer’s address and contact', value: stated(project.customerContact), share: 1 },
    ],
    [
      { caption: 'Items under test', value: itemsInShort(sections), share: 2 },
      { caption: 'Received', value: receivedDates(sections), share: 1 },
      { caption: 'Tested', value: testDates(sections), share: 1 },
    ],
    [
      { caption: 'Project', value: stated(project.name), share: 2 },
      { caption: 'Place of the test', value: placesOf(report.content), share: 2 },
    ],
    [
      { caption: 'Prepared by', value: report.preparedBy.name, share: 1 },
      { caption: 'Issued by', value: report.issuedBy?.name ?? 'not issued', share: 1 },
      {
        caption: 'Check code, see last page',
        value: report.checkCode ?? 'given when issued',
        mono: report.checkCode !== null,
        share: 1,
      },
    ],
  ]);
}

function itemsInShort(sections: readonly ReportSection[]): string {
  const names = itemsUnderTest(sections).map(({ name, serialNumber }) =>
    serialNumber === '' ? name : `${name}, no. ${serialNumber}`,
  );
  if (names.length === 0) return notStated;
  const shown = names.slice(0, 4).join('\n');
  return names.length > 4 ? `${shown}\nand ${names.length - 4} more` : shown;
}

/** A revision says what it takes the place of, so that nobody relies on the older one (7.8.8). */
function drawReplaced(sheet: Sheet, { replaces, number, content }: Report): void {
  if (replaces === null) return;
  const name = number === null ? '' : ` of ${number}`;
  const words = `This report replaces revision ${replaces.revision}${name}, which is superseded from the date of issue on.`;
  sheet.y += 10;
  drawPanel(sheet, colours.act, () => {
    sheet.paragraph(words, text.strong, 'P', panelPlace(sheet));
    sheet.y += 2;
    sheet.paragraph(`Reason: ${stated(content.revisionReason ?? '')}`, text.body, 'P', panelPlace(sheet));
  });
}

function drawResult(sheet: Sheet, { content }: Report): void {
  sheet.heading('Result', 90, 'H2');
  if (content.sections.length === 0) {
    const words = 'No recording is judged in this report; it shows predictions alone.';
    drawPanel(sheet, colours.near, () => sheet.paragraph(words, text.strong, 'P', panelPlace(sheet)));
    return;
  }
  const colour = resultColour(content.result);
  drawPanel(sheet, colour, () => {
    sheet.paragraph(resultName(content.result), tinted(text.verdict, colour), 'P', panelPlace(sheet));
    sheet.y += 2;
    sheet.paragraph(overallSentence(content), text.body, 'P', panelPlace(sheet));
  });
}

const panelIndent = 14;
const panelPlace = (sheet: Sheet) => ({
  x: sheet.left + panelIndent,
  width: sheet.width - panelIndent,
});

/** What must not be passed over, beside a thick stroke. */
export function drawPanel(sheet: Sheet, colour: string, body: () => void): void {
  const top = sheet.y;
  const pageOfTop = sheet.doc.page;
  body();
  const end = sheet.doc.page === pageOfTop ? sheet.y : top;
  if (end > top) sheet.artifact(() => sheet.doc.rect(sheet.left, top - 1, 4, end - top).fill(colour));
}

/** Each rule once, with the recordings it was applied to when there is more than one rule. */
function drawDecisionRules(sheet: Sheet, sections: readonly ReportSection[]): void {
  const rules = new Map<string, string[]>();
  for (const { verdict, recording } of sections) {
    rules.set(verdict.decisionRuleText, [...(rules.get(verdict.decisionRuleText) ?? []), recording.number]);
  }
  sheet.heading('Decision rule', 40, 'H2');
  for (const [rule, numbers] of rules) {
    if (rules.size > 1) sheet.paragraph([...new Set(numbers)].join(', '), text.strong);
    sheet.paragraph(rule);
    sheet.y += 4;
  }
}

function drawJudgedRecordings(sheet: Sheet, sections: readonly ReportSection[]): void {
  sheet.heading('Recordings judged', 70, 'H2');
  drawTable(
    sheet,
    [
      { header: 'Sheet', share: 0.6 },
      { header: 'Recording and channel', share: 2.6 },
      { header: 'Limit set', share: 2 },
      { header: 'Orders against the limit', share: 2.5 },
      { header: 'Result', share: 1.9 },
    ],
    sections.map(({ recording, verdict }, index) => [
      { text: String(index + 1), style: text.figure },
      { text: `${recording.number}  ${recording.name}\n${verdict.channelName}` },
      { text: verdict.limitSet.title },
      {
        text: `Orders against the limit: ${verdictInShort(verdict)}`,
        draw: (x, y, width) => drawTallyStrip(sheet, verdict.orders, x, y, width, 17),
      },
      {
        text: `${resultName(verdict.result)}\n${verdictInShort(verdict)}`,
        style: tinted(text.cellStrong, resultColour(verdict.result)),
      },
    ]),
  );
}

/** Studies stand apart from what was measured. */
function drawPredictions(sheet: Sheet, studies: readonly ReportStudy[]): void {
  if (studies.length === 0) return;
  sheet.heading('Predictions, not measurements', 60, 'H2');
  const outcome = (verdict: ReportStudy['result']['verdictAfter']): string =>
    verdict === null ? 'not judged' : `${resultName(verdict.result)}\n${verdictInShort(verdict)}`;
  drawTable(
    sheet,
    [
      { header: 'Study', share: 2.6 },
      { header: 'Starts from', share: 2.6 },
      { header: 'Before', share: 1.6 },
      { header: 'Behind, predicted', share: 1.6 },
    ],
    studies.map(({ number, name, version, source, result }) => [
      { text: `${number}  ${name}\nversion ${version}` },
      { text: source.words },
      { text: outcome(result.verdictBefore) },
      { text: result.output === null ? 'no steady state' : outcome(result.verdictAfter) },
    ]),
  );
}
