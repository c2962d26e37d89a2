import { Box, Button, Text } from '@chakra-ui/react';
import type { Report } from '@overtally/contracts';
import { MarginLayout } from '../../../components/margin-column.js';
import { notifyDone, notifyProblem } from '../../../components/notify.js';
import { TitleBlock, type TitleCell } from '../../../components/title-block.js';
import { verdictTone, verdictWords } from '../../../components/verdict/verdict-words.js';
import { formatDateTime } from '../../../lib/format-date.js';
import { ReportLog } from './report-log.js';
import { ReportSection } from './report-section.js';
import { ReportSteps } from './report-steps.js';

/** A report as it will be printed, with its way and its log. */
export function ReportSheet({ report }: { report: Report }) {
  const { content, summary, pdfSha256 } = report;
  return (
    <>
      <TitleBlock label="Report" cells={titleCells(report)} />
      <ReportSteps report={report} />
      <MarginLayout margin={<ReportLog events={report.events} />}>
        {pdfSha256 ? <IssuedSha sha256={pdfSha256} /> : null}
        {summary ? (
          <Text whiteSpace="pre-line" maxW="75ch" fontSize="md">
            {summary}
          </Text>
        ) : null}
        {content.sections.map((section, index) => (
          <ReportSection key={section.verdict.id} section={section} place={index + 1} />
        ))}
        <Text color="inkSoft" fontSize="13px" maxW="80ch">
          A verdict here is not a certificate by an accredited body unless the laboratory that issues it is
          one. The edition of each limit set is for the laboratory to check.
        </Text>
      </MarginLayout>
    </>
  );
}

function titleCells(report: Report): TitleCell[] {
  const { content } = report;
  const tone = verdictTone(content.result);
  return [
    { caption: 'Number', value: report.number ?? 'none yet', mono: report.number !== null },
    { caption: 'Revision', value: String(report.revision), mono: true },
    { caption: 'Customer', value: content.project.customer || 'not stated', grow: 1.5 },
    { caption: 'Project', value: content.project.name, grow: 2 },
    { caption: 'Verdicts', value: String(content.sections.length), mono: true },
    { caption: 'Prepared by', value: report.preparedBy.name, grow: 1.5 },
    {
      caption: 'Issued',
      value: report.issuedBy ? `${report.issuedBy.name}, ${formatDateTime(report.issuedAt)}` : 'not yet',
      grow: 1.5,
    },
    { caption: 'Result', value: verdictWords[content.result], ...(tone ? { tone } : {}) },
  ];
}

function IssuedSha({ sha256 }: { sha256: string }) {
  const copy = () => {
    navigator.clipboard.writeText(sha256).then(
      () => notifyDone('SHA-256 copied'),
      (error: unknown) => notifyProblem('Not copied', error),
    );
  };
  return (
    <Box mb="4" fontSize="13px">
      <Text color="inkSoft">SHA-256 of the issued PDF: a copy with another one is not this report.</Text>
      <Box as="span" fontFamily="mono" overflowWrap="anywhere" mr="2">
        {sha256}
      </Box>
      <Button size="2xs" variant="ghost" colorPalette="act" onClick={copy}>
        Copy
      </Button>
    </Box>
  );
}
