import type { Report, ReportSection } from '@overtally/contracts';
import { formatDate, formatText } from './format.js';
import { drawMark } from './mark.js';
import type { Sheet } from './sheet.js';
import { drawTable } from './table.js';
import { drawTallyStrip } from './tally-strip.js';
import { drawTitleBlock } from './title-block.js';
import { page, text, tinted } from './theme.js';
import { overallSentence, resultColour, resultName, statusName, verdictInShort } from './words.js';

const headTop = 40;

/** First page: what was judged, for whom, with which result, by which rule. */
export function drawCoverPage(sheet: Sheet, report: Report): void {
  drawHead(sheet);
  sheet.y = 92;
  sheet.paragraph('Harmonic report', text.soft);
  sheet.paragraph(report.title, text.title, 'H1');
  sheet.y += 10;
  drawReportBlock(sheet, report);
  drawResult(sheet, report);
  if (report.summary.trim() !== '') {
    sheet.heading('Summary', 30, 'H2');
    sheet.paragraph(report.summary);
  }
  drawDecisionRules(sheet, report.content.sections);
  drawJudgedRecordings(sheet, report.content.sections);
}

function drawHead(sheet: Sheet): void {
  sheet.artifact(() => {
    drawMark(sheet.doc, page.left, headTop, 17);
    sheet.line('overtally', { ...text.heading, size: 14 }, page.left + 38, headTop + 1);
  });
}

function drawReportBlock(sheet: Sheet, report: Report): void {
  const { project } = report.content;
  drawTitleBlock(sheet, [
    [
      {
        caption: 'Report',
        value: report.number ?? 'given when issued',
        mono: report.number !== null,
        share: 1.2,
      },
      { caption: 'Revision', value: String(report.revision), mono: true, share: 0.7 },
      { caption: 'Status', value: statusName(report.status) },
      { caption: 'Issued', value: formatDate(report.issuedAt) },
    ],
    [
      { caption: 'Project', value: formatText(project.name), share: 1.9 },
      { caption: 'Customer', value: formatText(project.customer), share: 2 },
    ],
    [
      { caption: 'Prepared by', value: report.preparedBy.name, share: 1.9 },
      { caption: 'Issued by', value: report.issuedBy?.name ?? '–', share: 2 },
    ],
  ]);
}

function drawResult(sheet: Sheet, { content }: Report): void {
  sheet.heading('Result', 60, 'H2');
  sheet.paragraph(resultName(content.result), tinted(text.verdict, resultColour(content.result)));
  sheet.y += 2;
  sheet.paragraph(overallSentence(content));
}

/** Each rule once, with the recordings it was applied to when there is more than one rule. */
function drawDecisionRules(sheet: Sheet, sections: readonly ReportSection[]): void {
  const rules = new Map<string, string[]>();
  for (const { verdict, recording } of sections) {
    rules.set(verdict.decisionRuleText, [...(rules.get(verdict.decisionRuleText) ?? []), recording.number]);
  }
  sheet.heading('Decision rule', 30, 'H2');
  for (const [rule, numbers] of rules) {
    if (rules.size > 1) sheet.paragraph([...new Set(numbers)].join(', '), text.strong);
    sheet.paragraph(rule);
    sheet.y += 4;
  }
}

function drawJudgedRecordings(sheet: Sheet, sections: readonly ReportSection[]): void {
  sheet.heading('Recordings judged', 50, 'H2');
  drawTable(
    sheet,
    [
      { header: 'No.', share: 1 },
      { header: 'Recording and channel', share: 2.5 },
      { header: 'Limit set', share: 2 },
      { header: 'Orders against the limit', share: 2.5 },
      { header: 'Result', share: 1.8 },
    ],
    sections.map(({ recording, verdict }) => [
      { text: recording.number, style: text.figure },
      { text: `${recording.name}\n${verdict.channelName}` },
      { text: verdict.limitSet.title },
      {
        text: `Orders against the limit: ${verdictInShort(verdict)}`,
        draw: (x, y, width) => drawTallyStrip(sheet, verdict.orders, x, y, width, 17),
      },
      { text: verdictInShort(verdict), style: tinted(text.cellStrong, resultColour(verdict.result)) },
    ]),
  );
}
