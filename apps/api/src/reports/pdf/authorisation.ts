import type { Report, ReportEvent } from '@overtally/contracts';
import { formatMoment } from './format.js';
import type { Sheet } from './sheet.js';
import { drawTitleBlock, type TitleCell } from './title-block.js';

interface Signatory {
  role: string;
  name: string;
  moment: string;
  comment: string;
}

const samePerson = 'Prepared and issued by the same person, as the project allows.';

/** Who prepared, submitted and issued the report, when, and where they sign. */
export function drawAuthorisation(sheet: Sheet, report: Report): void {
  sheet.heading('Authorisation', 150, 'H2');
  const signatories = signatoriesOf(report);
  const row = (cell: (signatory: Signatory) => TitleCell): TitleCell[] => signatories.map(cell);
  drawTitleBlock(sheet, [
    row(({ role, name }) => ({ caption: role, value: name, strong: true })),
    row(({ moment, comment }) => ({
      caption: 'When',
      value: comment === '' ? moment : `${moment}\n${comment}`,
    })),
    row(() => ({ caption: 'Signature', value: '\n\n ' })),
  ]);
}

function signatoriesOf(report: Report): Signatory[] {
  const submitted = lastOf(report.events, 'submitted');
  const isIssued = report.issuedBy !== null && report.issuedAt !== null;
  return [
    {
      role: 'Prepared by',
      name: report.preparedBy.name,
      moment: formatMoment(report.createdAt),
      comment: '',
    },
    {
      role: 'Submitted for review by',
      name: report.submittedBy?.name ?? submitted?.by.name ?? 'not submitted',
      moment: formatMoment(submitted?.at ?? null),
      comment: submitted?.comment ?? '',
    },
    {
      role: 'Reviewed and authorised for issue by',
      name: isIssued ? report.issuedBy!.name : 'not issued',
      moment: formatMoment(report.issuedAt),
      comment: report.isIssuedByPreparer ? samePerson : '',
    },
  ];
}

function lastOf(events: readonly ReportEvent[], kind: ReportEvent['kind']): ReportEvent | undefined {
  return events.filter((event) => event.kind === kind).at(-1);
}
