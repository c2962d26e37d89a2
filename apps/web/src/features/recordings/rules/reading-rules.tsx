import { Text } from '@chakra-ui/react';
import { useQuery } from '@tanstack/react-query';
import { EmptyState } from '../../../components/empty-state.js';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { Section } from '../../../components/section.js';
import { readingRulesQuery } from '../api/list-reading-rules.js';
import { RuleTable } from './rule-table.js';

interface ReadingRulesProps {
  projectId: string;
  mayWrite: boolean;
}

/** The reading rules of a project, in the order in which they are tried. */
export function ReadingRules({ projectId, mayWrite }: ReadingRulesProps) {
  const rules = useQuery(readingRulesQuery(projectId));
  return (
    <Section
      title="Reading rules"
      lead="A new file is read by the settings of the first rule that fits its name and columns."
    >
      {rules.isPending ? <LoadingState label="Loading the reading rules" lines={2} /> : null}
      {rules.isError ? <ErrorState error={rules.error} onRetry={() => void rules.refetch()} /> : null}
      {rules.data?.length === 0 ? (
        <EmptyState title="No reading rule yet">
          {mayWrite
            ? 'Under Recordings, tick “Check before reading” and drop a capture. Set how it is to be read, then choose “Keep these settings as a reading rule”.'
            : 'Technicians, analysts and managers of the project keep the settings of a capture as a rule.'}
        </EmptyState>
      ) : null}
      {rules.data && rules.data.length > 0 ? (
        <>
          <RuleTable projectId={projectId} rules={rules.data} mayWrite={mayWrite} />
          <Text color="inkSoft" fontSize="13px" mt="2" maxW="76ch">
            Tried from top to bottom: rules bound to columns before others, then the longer pattern, then the
            newer rule. A rule changes nothing that was read before.
          </Text>
        </>
      ) : null}
    </Section>
  );
}
