import type { Report } from '@overtally/contracts';
import { drawPanel } from './cover-page.js';
import { drawFacts, type Fact } from './facts.js';
import { formatDate, formatDay } from './format.js';
import { itemsUnderTest, placesOf, receivedDates, testDates } from './items.js';
import { methodName } from './method.js';
import type { Sheet } from './sheet.js';
import { colours, text, tinted } from './theme.js';
import { laboratoryName, notStated, stated } from './words.js';

/** What ISO/IEC 17025:2017, 7.8.2.1 and 7.8.3, asks a test report to state, in one place. */
export function drawParticulars(sheet: Sheet, report: Report): void {
  sheet.heading('Particulars', 120, 'H2');
  drawOverdue(sheet, report);
  drawFacts(sheet, [...laboratoryFacts(report), ...itemFacts(report), ...testFacts(report)]);
}

/** Why it was issued although calibrations were overdue stands before all else. */
function drawOverdue(sheet: Sheet, { overdueReason }: Report): void {
  if (overdueReason === null) return;
  const place = { x: sheet.left + 14, width: sheet.width - 14 };
  drawPanel(sheet, colours.near, () => {
    const words = 'Issued although a calibration was overdue or missing when a recording was captured';
    sheet.paragraph(words, tinted(text.strong, colours.near), 'P', place);
    sheet.paragraph(`Reason given: ${stated(overdueReason)}`, text.body, 'P', place);
  });
  sheet.y += 8;
}

const noAccreditation =
  'None is claimed: the laboratory states no accreditation, and nothing here is reported under one.';

function laboratoryFacts({ content }: Report): Fact[] {
  const { laboratory, project } = content;
  return [
    ['Laboratory', [laboratoryName(content), stated(laboratory.address, 'address not stated')].join('\n')],
    ['Contact of the laboratory', stated(laboratory.contact)],
    ['Accreditation', stated(laboratory.accreditation, noAccreditation)],
    ['Place of the activities', placesOf(content)],
    [
      'Customer',
      [stated(project.customer), stated(project.customerContact, 'contact not stated')].join('\n'),
    ],
  ];
}

function itemFacts({ content: { sections } }: Report): Fact[] {
  const items = itemsUnderTest(sections);
  const facts = items.map((item, index): Fact => [
    items.length === 1 ? 'Item under test' : `Item under test ${index + 1}`,
    [
      item.name,
      `Manufacturer: ${stated(item.manufacturer)}; model: ${stated(item.model)}; serial number: ${stated(item.serialNumber)}`,
      `Ratings: ${stated(item.ratings)}`,
      `Received: ${item.receivedOn === null ? notStated : formatDay(item.receivedOn)}; condition and remarks: ${stated(item.remark, 'none stated')}`,
    ].join('\n'),
  ]);
  return facts.length > 0 ? facts : [['Item under test', notStated]];
}

function testFacts(report: Report): Fact[] {
  const { sections } = report.content;
  const methods = new Set(sections.map(methodName));
  return [
    ['Date of receipt', receivedDates(sections)],
    ['Dates of the test', testDates(sections)],
    ['Date of issue', report.issuedAt === null ? 'not issued' : formatDate(report.issuedAt)],
    ['Methods', [...methods].join('\n')],
    [
      'Deviations from the methods',
      stated(report.deviations, 'No additions, deviations or exclusions are stated.'),
    ],
    ['Sampling', 'No sampling plan or method applies: the items were tested as they were received.'],
    ['External providers', 'No result is stated to come from an external provider.'],
    [
      'Scope of the results',
      'The results relate only to the items tested, in the condition and operating modes stated.',
    ],
    [
      'Reproduction',
      'This report may not be reproduced except in full, unless the laboratory has agreed to it in writing.',
    ],
    [
      'Opinions and interpretations',
      'The summary, and the notes of the analyst with the causes they name, are opinions and interpretations based on the results.',
    ],
  ];
}
