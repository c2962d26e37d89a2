import { Button, Flex, Text } from '@chakra-ui/react';
import type { Analysis } from '@overtally/contracts';
import { Sheet } from '../../../components/sheet.js';
import { formatDateTime } from '../../../lib/format-date.js';
import { FailNotice } from './run-notice.js';

interface StandingNoticeProps {
  analysis: Analysis;
  latestId: string | null;
  onLatest: () => void;
}

/** Says that an earlier or failed analysis is being looked at, and leads back to the latest. */
export function StandingNotice({ analysis, latestId, onLatest }: StandingNoticeProps) {
  const back = <Button onClick={onLatest}>Show the latest</Button>;
  if (analysis.status === 'failed' && analysis.problem) {
    return (
      <FailNotice
        title={analysis.problem.code === 'cancelled' ? 'This analysis was cancelled' : 'This analysis failed'}
        problem={analysis.problem}
        actions={latestId ? back : undefined}
      />
    );
  }
  if (analysis.status !== 'done' || analysis.id === latestId || latestId === null) return null;
  return (
    <Sheet px="4" py="2.5" mb="4" borderLeftWidth="3px" borderLeftColor="near" role="status">
      <Flex justify="space-between" align="center" gap="4" wrap="wrap">
        <Text>
          <strong>{analysis.supersededById ? 'Superseded analysis' : 'Earlier analysis'}</strong> of{' '}
          {formatDateTime(analysis.finishedAt)}.
        </Text>
        {back}
      </Flex>
    </Sheet>
  );
}
