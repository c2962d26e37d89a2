import { Box, Link, Table, Text } from '@chakra-ui/react';
import type { ReportListItem } from '@overtally/contracts';
import { Link as RouterLink } from 'react-router-dom';
import { Sheet } from '../../../components/sheet.js';
import { ResultWords } from '../../../components/verdict/result-words.js';
import { formatDate, formatDateTimeFull } from '../../../lib/format-date.js';
import { standingWords } from '../report-words.js';

interface ReportTableProps {
  reports: readonly ReportListItem[];
  reportTo: (reportId: string) => string;
}

/** Reports of a project with their state and their result in words. */
export function ReportTable({ reports, reportTo }: ReportTableProps) {
  return (
    <Sheet overflowX="auto">
      <Table.Root size="md" aria-label="Reports">
        <Table.Header>
          <Table.Row>
            <Table.ColumnHeader scope="col" w="24" hideBelow="sm">
              No.
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col">Report</Table.ColumnHeader>
            <Table.ColumnHeader scope="col">State</Table.ColumnHeader>
            <Table.ColumnHeader scope="col">Result</Table.ColumnHeader>
            <Table.ColumnHeader scope="col" textAlign="end" hideBelow="md">
              Verdicts
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col" hideBelow="md">
              Issued
            </Table.ColumnHeader>
          </Table.Row>
        </Table.Header>
        <Table.Body>
          {reports.map((report) => (
            <Row key={report.id} report={report} to={reportTo(report.id)} />
          ))}
        </Table.Body>
      </Table.Root>
    </Sheet>
  );
}

function Row({ report, to }: { report: ReportListItem; to: string }) {
  return (
    <Table.Row>
      <Table.Cell hideBelow="sm" whiteSpace="nowrap" fontFamily={report.number ? 'mono' : undefined}>
        {report.number ?? <Text color="inkSoft">none yet</Text>}
      </Table.Cell>
      <Table.Cell>
        <Link asChild fontWeight="600">
          <RouterLink to={to}>{report.title}</RouterLink>
        </Link>
        <Text color="inkSoft" fontSize="13px">
          <Box as="span" hideFrom="sm">
            {report.number ? `${report.number}, ` : ''}
          </Box>
          Revision {report.revision}, prepared by {report.preparedBy.name}
        </Text>
      </Table.Cell>
      <Table.Cell whiteSpace="nowrap">{standingWords(report)}</Table.Cell>
      <Table.Cell>
        <ResultWords result={report.result} />
      </Table.Cell>
      <Table.Cell textAlign="end" fontFamily="mono" hideBelow="md">
        {report.sections}
      </Table.Cell>
      <Table.Cell hideBelow="md" whiteSpace="nowrap" title={formatDateTimeFull(report.issuedAt)}>
        {formatDate(report.issuedAt)}
      </Table.Cell>
    </Table.Row>
  );
}
