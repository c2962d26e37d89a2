import { Inject, Injectable } from '@nestjs/common';
import { reportCheckPath, type Mail, type ReportRecipient } from '@overtally/contracts';
import type { Database, Tx } from '@overtally/db';
import { problem } from '../common/problem.js';
import type { SignedInUser } from '../common/request.js';
import { AppConfig } from '../config/app-config.js';
import { DATABASE } from '../database/database.tokens.js';
import { MailsService, type NewMail } from '../mails/mails.service.js';
import { ReportNoticesRepository, type NoticedReport } from './report-notices.repository.js';
import { reportNumber } from './report-number.js';

/** Tells people by e-mail what happened with a report; the messages go into the transaction of the step. */
@Injectable()
export class ReportNotices {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly config: AppConfig,
    private readonly repository: ReportNoticesRepository,
    private readonly mails: MailsService,
  ) {}

  /** Asks every manager who may issue the report to review it, but not who submitted it. */
  async reviewRequested(tx: Tx, reportId: string, by: SignedInUser, comment: string): Promise<void> {
    const report = await this.repository.find(tx, reportId);
    const subject = `Review requested: ${report.title}`;
    for (const to of await this.repository.reviewers(tx, report, by.id)) {
      await this.mails.enqueue(tx, {
        ...this.about(report, 'review-requested'),
        ...{ to, subject },
        message: {
          heading: 'A report waits for review',
          facts: factsOf(report),
          paragraphs: [`${by.name} submitted it for review.`],
          ...(comment !== '' && { quote: comment }),
          action: { label: 'Review the report', href: this.address(report) },
          reason: 'You get this message because you may issue reports of this project.',
        },
      });
    }
  }

  /** Tells who prepared and who submitted a report that it came back, and why. */
  async returned(tx: Tx, reportId: string, by: SignedInUser, comment: string): Promise<void> {
    const report = await this.repository.find(tx, reportId);
    const subject = `Returned: ${report.title}`;
    for (const to of await this.repository.authors(tx, report, by.id)) {
      await this.mails.enqueue(tx, {
        ...this.about(report, 'report-returned'),
        ...{ to, subject },
        message: {
          heading: 'A report came back',
          facts: factsOf(report),
          paragraphs: [`${by.name} returned it as a draft, to be mended:`],
          quote: comment,
          action: { label: 'Open the draft', href: this.address(report) },
          reason: 'You get this message because you prepared or submitted the report.',
        },
      });
    }
  }

  /** Sends an issued report to its recipients, and tells those who prepared and submitted it. */
  async issued(tx: Tx, reportId: string, by: SignedInUser): Promise<void> {
    const report = await this.repository.find(tx, reportId);
    for (const recipient of report.recipients) await this.deliver(tx, report, recipient);
    const served = new Set(report.recipients.map(({ email }) => email));
    const subject = `Issued: ${nameOf(report)}`;
    for (const to of await this.repository.authors(tx, report, by.id)) {
      if (served.has(to.email)) continue;
      await this.mails.enqueue(tx, {
        ...this.about(report, 'report-issued'),
        ...{ to, subject },
        message: {
          heading: 'A report was issued',
          facts: factsOf(report),
          paragraphs: [`${by.name} issued it. It is frozen and can be read by everybody in the project.`],
          action: { label: 'Open the report', href: this.address(report) },
          reason: 'You get this message because you prepared or submitted the report.',
        },
      });
    }
  }

  /**
   * Sends an issued report to one more recipient.
   * @throws 409 unless the report is the issued revision
   */
  async send(reportId: string, recipient: ReportRecipient): Promise<Mail> {
    const id = await this.database.transaction(async (tx) => {
      const report = await this.repository.find(tx, reportId);
      if (report.status === 'issued') return this.deliver(tx, report, recipient);
      const detail =
        report.status === 'superseded'
          ? 'This revision is superseded; send the one that replaced it'
          : 'Only an issued report can be sent';
      throw problem(409, 'wrong-state', detail);
    });
    return this.mails.get(id);
  }

  private deliver(tx: Tx, report: NoticedReport, { name, email }: ReportRecipient): Promise<string> {
    const { pdfKey, pdfSha256, number, revision, checkCode } = report;
    if (pdfKey === null || pdfSha256 === null || number === null) {
      throw new Error(`Report ${report.id} has no PDF to be sent`);
    }
    const fileName = `${reportNumber(number)}-revision-${revision}.pdf`;
    const replaced =
      report.replacesId === null ? [] : ['It replaces the revision before, which is superseded.'];
    return this.mails.enqueue(tx, {
      ...this.about(report, 'report-issued'),
      to: { name, email },
      subject: nameOf(report),
      attachments: [{ fileName, contentType: 'application/pdf', storageKey: pdfKey, sha256: pdfSha256 }],
      message: {
        heading: nameOf(report),
        facts: [
          ...factsOf(report),
          ...(checkCode === null ? [] : [['Check code', checkCode] as const]),
          ['SHA-256 of the PDF', pdfSha256],
        ],
        paragraphs: [
          ...(name === '' ? [] : [`To ${name}`]),
          `The report is attached as ${fileName}.`,
          ...replaced,
          'Whether the file is the one that was issued, and whether the revision is current, can be checked at any time.',
        ],
        ...(checkCode !== null && {
          action: {
            label: 'Check the report',
            href: `${this.config.publicUrl}${reportCheckPath(reportNumber(number), checkCode)}`,
          },
        }),
        reason: 'You get this message because the laboratory named you as a recipient of this report.',
      },
    });
  }

  private about({ id, projectId }: NoticedReport, kind: NewMail['kind']) {
    return { kind, projectId, reportId: id };
  }

  private address({ id, projectId }: NoticedReport): string {
    return `${this.config.publicUrl}/projects/${projectId}/reports/${id}`;
  }
}

const nameOf = ({ number, revision, title }: NoticedReport): string =>
  number === null ? title : `Report ${reportNumber(number)}, revision ${revision}: ${title}`;

function factsOf({ number, revision, title, projectName, customer }: NoticedReport) {
  return [
    ['Report', number === null ? 'No number yet' : `${reportNumber(number)}, revision ${revision}`],
    ['Title', title],
    ['Project', projectName],
    ...(customer === '' ? [] : [['Customer', customer] as const]),
  ] satisfies NewMail['message']['facts'];
}
