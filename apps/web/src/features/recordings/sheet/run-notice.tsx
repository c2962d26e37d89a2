import { Box, Button, Flex, Heading, Progress, Text } from '@chakra-ui/react';
import type { ReadProblem, Recording } from '@overtally/contracts';
import type { ReactNode } from 'react';
import { notifyProblem } from '../../../components/notify.js';
import { Sheet } from '../../../components/sheet.js';
import { CancelReading } from '../cancel-reading-button.js';
import { useRecordingChanges } from '../hooks/use-recording-changes.js';

const titles = {
  received: 'Waiting to be read',
  reading: 'Reading the source',
  analysing: 'Analysing',
} as const;

interface RunNoticeProps {
  recording: Recording;
  status: keyof typeof titles;
  /** Share done, 0 to 1. */
  progress: number;
  /** Analysis that can be called off; null when there is none or the person may not. */
  analysisId: string | null;
  mayCancelReading: boolean;
}

/** What the worker is doing to the recording, how far it is, and the way to stop it. */
export function RunNotice({ recording, status, progress, analysisId, mayCancelReading }: RunNoticeProps) {
  const { cancel } = useRecordingChanges(recording);
  const waiting = status === 'received' || progress === 0;
  return (
    <Sheet px="4" py="3" mb="4" aria-live="polite">
      <Flex align="center" justify="space-between" gap="4">
        <Progress.Root
          flex="1"
          size="xs"
          value={waiting ? null : Math.round(progress * 100)}
          colorPalette="act"
          aria-label={titles[status]}
        >
          <Flex justify="space-between" mb="1.5">
            <Progress.Label fontWeight="600">{titles[status]}</Progress.Label>
            {waiting ? null : <Progress.ValueText fontFamily="mono" />}
          </Flex>
          <Progress.Track bg="rule">
            <Progress.Range />
          </Progress.Track>
        </Progress.Root>
        {analysisId ? (
          <Button
            size="xs"
            loading={cancel.isPending}
            onClick={() =>
              cancel.mutate(analysisId, {
                onError: (error) => notifyProblem('The analysis was not cancelled', error),
              })
            }
          >
            Cancel
          </Button>
        ) : null}
        {mayCancelReading && status !== 'analysing' ? <CancelReading recording={recording} /> : null}
      </Flex>
    </Sheet>
  );
}

/** What failed, where, and what to do about it. */
export function FailNotice({
  title,
  problem,
  actions,
}: {
  title: string;
  problem: ReadProblem;
  actions?: ReactNode;
}) {
  const place = [
    problem.line === undefined ? '' : `line ${problem.line}`,
    problem.column === undefined ? '' : `column ${problem.column}`,
  ].filter(Boolean);
  return (
    <Sheet px="4" py="3.5" mb="4" borderLeftWidth="3px" borderLeftColor="over" role="alert">
      <Heading as="h2" fontSize="md" lineHeight="1.3">
        {title}
      </Heading>
      <Text mt="1" maxW="76ch" overflowWrap="anywhere">
        {place.length > 0 ? (
          <Box as="span" fontFamily="mono" fontSize="13px" color="inkSoft" mr="2">
            {place.join(', ')}
          </Box>
        ) : null}
        {problem.message}
      </Text>
      <Text mt="1" maxW="76ch" color="inkSoft">
        {problem.cure}
      </Text>
      {actions ? (
        <Flex gap="2" mt="3" wrap="wrap">
          {actions}
        </Flex>
      ) : null}
    </Sheet>
  );
}
