import { Box, Text } from '@chakra-ui/react';
import type { Report } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { Section } from '../../../components/section.js';
import { reportQuery } from '../api/get-report.js';
import { revisionChanges } from '../revision-changes.js';

interface RevisionChangesListProps {
  report: Report;
  /** The revision that it replaces. */
  beforeId: string;
}

/** Why there is a new revision, and what it says otherwise than the one before. */
export function RevisionChangesList({ report, beforeId }: RevisionChangesListProps) {
  const { data: before, ...query } = useQuery(reportQuery(beforeId));
  const changes = before ? revisionChanges(before, report) : [];
  return (
    <Section title={`What changed since revision ${report.revision - 1}`} mt="3">
      <Text mb="2" maxW="75ch" whiteSpace="pre-line">
        <Box as="span" fontWeight="600">
          Reason for the revision:{' '}
        </Box>
        {report.revisionReason ?? 'not stated yet; it is asked for when the report is submitted.'}
      </Text>
      {query.isPending ? <LoadingState label="Comparing the revisions" lines={2} /> : null}
      {query.isError ? <ErrorState error={query.error} onRetry={() => void query.refetch()} /> : null}
      {before && changes.length === 0 ? (
        <Text color="inkSoft">Title, summary, deviations, verdicts and results are the same.</Text>
      ) : null}
      <Box as="ul" listStyleType="none">
        {changes.map(({ subject, before: was, after }) => (
          <Box as="li" key={`${subject} ${was} ${after}`} py="2" borderBottomWidth="1px" borderColor="rule">
            <Text fontWeight="600">{subject}</Text>
            <Text color="inkSoft" maxW="75ch">
              Was: {was}
            </Text>
            <Text maxW="75ch">Is: {after}</Text>
          </Box>
        ))}
      </Box>
    </Section>
  );
}
