import { Box, Link, Text } from '@chakra-ui/react';
import type { Report } from '@overtally/contracts';
import { Link as RouterLink } from 'react-router-dom';
import { StatusMark } from '../../../components/status-mark.js';
import { formatDateTime } from '../../../lib/format-date.js';
import { statusWords } from '../report-words.js';

interface ReportStandingProps {
  report: Report;
  reportTo: (reportId: string) => string;
}

/** What the reader must know before the rest: what must be mended, what hinders the issue, which revision counts. */
export function ReportStanding({ report, reportTo }: ReportStandingProps) {
  const { returned, cautions, replaces, replacedBy, isIssuedByPreparer, overdueReason } = report;
  const isOpen = report.status === 'draft' || report.status === 'in-review';
  return (
    <>
      {returned ? (
        <Callout label="Returned for mending">
          <StatusMark tone="near">
            Returned by {returned.by.name}, {formatDateTime(returned.at)}
          </StatusMark>
          <Text mt="1" whiteSpace="pre-line" maxW="75ch">
            {returned.comment}
          </Text>
        </Callout>
      ) : null}
      {replacedBy ? (
        <Callout label="Newer revision">
          <StatusMark tone={report.status === 'superseded' ? 'near' : 'within'}>
            {report.status === 'superseded' ? 'Superseded by ' : 'Still current; being revised as '}
            <Link asChild color="act">
              <RouterLink to={reportTo(replacedBy.id)}>
                revision {replacedBy.revision}, {statusWords[replacedBy.status].toLowerCase()}
              </RouterLink>
            </Link>
          </StatusMark>
        </Callout>
      ) : null}
      {replaces ? (
        <Text mb="3" color="inkSoft">
          {isOpen ? 'Will replace ' : 'Replaces '}
          <Link asChild color="act">
            <RouterLink to={reportTo(replaces.id)}>revision {replaces.revision}</RouterLink>
          </Link>
          {isOpen ? ' once it is issued.' : '.'}
        </Text>
      ) : null}
      {isOpen && cautions.length > 0 ? (
        <Callout label="Cautions">
          <Text fontWeight="600">Before it is issued</Text>
          <Box as="ul" pl="5" listStyleType="disc">
            {cautions.map(({ code, section, message }) => (
              <Box as="li" key={`${code} ${section} ${message}`} maxW="80ch">
                Section {section + 1}: {message}.
              </Box>
            ))}
          </Box>
        </Callout>
      ) : null}
      {overdueReason ? (
        <Callout label="Overdue calibration">
          <StatusMark tone="near">Issued although calibration was overdue</StatusMark>
          <Text mt="1" whiteSpace="pre-line" maxW="75ch">
            {overdueReason}
          </Text>
        </Callout>
      ) : null}
      {isIssuedByPreparer ? (
        <Text mb="3" color="inkSoft">
          Prepared and issued by the same person, as the project allows.
        </Text>
      ) : null}
    </>
  );
}

function Callout({ label, children }: { label: string; children: React.ReactNode }) {
  return (
    <Box
      as="section"
      aria-label={label}
      borderLeftWidth="3px"
      borderColor="near"
      bg="sheet"
      px="4"
      py="3"
      mb="3"
    >
      {children}
    </Box>
  );
}
