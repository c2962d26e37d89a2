import { Box, Text } from '@chakra-ui/react';
import { holds, type ProjectRole, type Report } from '@overtally/contracts';
import { MarginLayout } from '../../../components/margin-column.js';
import { TitleBlock, type TitleCell } from '../../../components/title-block.js';
import { verdictTone, verdictWords } from '../../../components/verdict/verdict-words.js';
import { formatDateTime } from '../../../lib/format-date.js';
import { CommentForm } from './comment-form.js';
import { IssuedPanel } from './issued-panel.js';
import { ReportLog } from './report-log.js';
import { ReportPrediction } from './report-prediction.js';
import { ReportSection } from './report-section.js';
import { ReportStanding } from './report-standing.js';
import { ReportSteps } from './report-steps.js';
import { RevisionChangesList } from './revision-changes-list.js';

interface ReportSheetProps {
  report: Report;
  role: ProjectRole | null;
  reportTo: (reportId: string) => string;
}

/** A report as it will be printed, with its way and its log. */
export function ReportSheet({ report, role, reportTo }: ReportSheetProps) {
  const { content, summary, deviations, replaces } = report;
  const mayComment = holds('report.comment', role);
  return (
    <>
      <TitleBlock label="Report" cells={titleCells(report)} />
      <ReportSteps report={report} />
      <ReportStanding report={report} reportTo={reportTo} />
      <MarginLayout
        margin={
          <ReportLog events={report.events}>{mayComment ? <CommentForm report={report} /> : null}</ReportLog>
        }
      >
        <IssuedPanel report={report} />
        {summary ? (
          <Text whiteSpace="pre-line" maxW="75ch" fontSize="md">
            {summary}
          </Text>
        ) : null}
        {deviations ? (
          <Text whiteSpace="pre-line" maxW="75ch" mt="2">
            <Box as="span" fontWeight="600">
              Deviations from the method:{' '}
            </Box>
            {deviations}
          </Text>
        ) : null}
        {report.recipients.length > 0 ? (
          <Text color="inkSoft" mt="2" maxW="75ch" overflowWrap="anywhere">
            For {report.recipients.map(({ name, email }) => (name ? `${name} (${email})` : email)).join(', ')}
          </Text>
        ) : null}
        {replaces ? <RevisionChangesList report={report} beforeId={replaces.id} /> : null}
        {content.sections.map((section, index) => (
          <ReportSection key={section.verdict.id} section={section} place={index + 1} />
        ))}
        {content.studies.map((study, index) => (
          <ReportPrediction key={study.versionId} study={study} place={index + 1} />
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
    ...(content.studies.length > 0
      ? [{ caption: 'Predictions', value: String(content.studies.length), mono: true }]
      : []),
    { caption: 'Prepared by', value: report.preparedBy.name, grow: 1.5 },
    {
      caption: 'Issued',
      value: report.issuedBy ? `${report.issuedBy.name}, ${formatDateTime(report.issuedAt)}` : 'not yet',
      grow: 1.5,
    },
    { caption: 'Result', value: verdictWords[content.result], ...(tone ? { tone } : {}) },
  ];
}
