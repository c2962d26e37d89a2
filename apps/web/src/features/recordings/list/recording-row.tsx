import { Box, Checkbox, Flex, Link, Progress, Table, Text } from '@chakra-ui/react';
import type { ChannelSummary, LimitSet, Recording } from '@overtally/contracts';
import { Link as RouterLink } from 'react-router-dom';
import { TallyStrip } from '../../../components/tally-strip.js';
import { formatDateTime } from '../../../lib/format-date.js';
import { formatDuration, formatHz, formatSi } from '../../../lib/format.js';
import { CancelReading } from '../cancel-reading-button.js';
import { percentWords } from '../percent-words.js';
import { isBusy, isCancelled, statusWords } from '../recording-status.js';
import { compareRecording } from './comparison.js';

interface RecordingRowProps {
  recording: Recording;
  limitSet: LimitSet | null;
  to: string;
  selected: boolean;
  /** False once as many are chosen as an overlay holds. */
  selectable: boolean;
  onSelect: (selected: boolean) => void;
  /** Whether reading may be called off. */
  mayCancel: boolean;
}

const figureCell = { textAlign: 'end', fontFamily: 'mono', fontSize: '13px', whiteSpace: 'nowrap' } as const;

/** One recording: what it is, its main figures, and how it stands against the limits. */
export function RecordingRow(props: RecordingRowProps) {
  const { recording, limitSet, to, selected, selectable, onSelect, mayCancel } = props;
  const comparison = compareRecording(recording, limitSet);
  const { channel } = comparison;
  return (
    <Table.Row bg={selected ? 'wash' : undefined} _hover={{ bg: 'wash' }} position="relative">
      <Table.Cell w="1" position="relative" zIndex="1">
        <Checkbox.Root
          checked={selected}
          disabled={recording.status !== 'ready' || (!selected && !selectable)}
          onCheckedChange={(details) => onSelect(details.checked === true)}
          size="sm"
        >
          <Checkbox.HiddenInput aria-label={`Choose ${recording.number} for an overlay`} />
          <Checkbox.Control />
        </Checkbox.Root>
      </Table.Cell>
      <Table.Cell fontFamily="mono" fontSize="13px" whiteSpace="nowrap" hideBelow="sm">
        {recording.number}
      </Table.Cell>
      <Table.Cell minW={{ base: '0', lg: '200px' }}>
        <Link
          asChild
          color="ink"
          _hover={{ color: 'act' }}
          _after={{ content: '""', position: 'absolute', inset: '0' }}
        >
          <RouterLink to={to}>{recording.name}</RouterLink>
        </Link>
        <Text color="inkSoft" fontSize="xs" overflowWrap="anywhere">
          <Box as="span" hideFrom="sm" fontFamily="mono">
            {recording.number}{' '}
          </Box>
          {recording.eut}
        </Text>
        {channel ? (
          <Text hideFrom="md" fontFamily="mono" fontSize="xs" mt="1">
            {figureWords(channel)}
          </Text>
        ) : null}
        <Box hideFrom="lg" mt="1.5">
          <Standing recording={recording} comparison={comparison} mayCancel={mayCancel} />
        </Box>
      </Table.Cell>
      <Table.Cell color="inkSoft" whiteSpace="nowrap" hideBelow="xl">
        {recording.capturedAt
          ? formatDateTime(recording.capturedAt)
          : `received ${formatDateTime(recording.createdAt)}`}
      </Table.Cell>
      <Table.Cell {...figureCell} hideBelow="2xl">
        {formatSi(recording.sampleRateHz, 'Hz', { trim: true })}
      </Table.Cell>
      <Table.Cell {...figureCell} hideBelow="xl">
        {formatDuration(recording.durationS)}
      </Table.Cell>
      <Table.Cell {...figureCell} hideBelow="md">
        {formatHz(channel?.fundamentalHz ?? null)}
      </Table.Cell>
      <Table.Cell {...figureCell} hideBelow="md">
        {formatSi(channel?.rms ?? null, channel?.unit ?? '')}
      </Table.Cell>
      <Table.Cell {...figureCell} hideBelow="md">
        {percentWords(channel?.thdFPercent ?? null)}
      </Table.Cell>
      <Table.Cell hideBelow="lg">
        <Standing recording={recording} comparison={comparison} mayCancel={mayCancel} />
      </Table.Cell>
    </Table.Row>
  );
}

/** The figures of the hidden columns in a line, for narrow screens. */
function figureWords({ fundamentalHz, rms, unit, thdFPercent }: ChannelSummary): string {
  const parts = [formatSi(rms, unit)];
  if (fundamentalHz !== null) parts.unshift(formatHz(fundamentalHz, 2));
  if (thdFPercent !== null) parts.push(`THD ${percentWords(thdFPercent)}`);
  return parts.join(' · ');
}

/** The tally strip with its words; before there is one, how far the work is or why it failed. */
function Standing({
  recording,
  comparison,
  mayCancel,
}: {
  recording: Recording;
  comparison: ReturnType<typeof compareRecording>;
  mayCancel: boolean;
}) {
  if (isBusy(recording)) return <Working recording={recording} mayCancel={mayCancel} />;
  if (recording.problem) {
    return (
      <Text fontSize="13px" maxW="46ch" whiteSpace="normal">
        <Box as="span" color={isCancelled(recording.problem) ? 'inkSoft' : 'over'} fontWeight="600">
          {recording.sampleRateHz === null ? 'Not read: ' : 'Not analysed: '}
        </Box>
        {recording.problem.message}
      </Text>
    );
  }
  return (
    <Box display="flex" alignItems="center" columnGap="4" rowGap="1" flexWrap="wrap">
      {comparison.compared > 0 ? <TallyStrip shares={comparison.shares} /> : null}
      <Text fontSize="13px" color={comparison.tone} fontWeight={comparison.tone === 'over' ? '600' : '400'}>
        {comparison.words}
        {comparison.compared > 1 ? ` (${comparison.channel?.name ?? ''})` : ''}
      </Text>
    </Box>
  );
}

function Working({ recording, mayCancel }: { recording: Recording; mayCancel: boolean }) {
  const words = statusWords[recording.status];
  const waits = recording.status === 'received';
  return (
    <Flex align="flex-end" gap="3">
      <Progress.Root
        value={waits ? null : Math.round(recording.progress * 100)}
        size="xs"
        colorPalette="act"
        flex="1"
        maxW="220px"
        aria-label={`${recording.number}: ${words}`}
      >
        <Text fontSize="13px" color="inkSoft">
          {words}
          {waits ? '' : ` ${Math.round(recording.progress * 100)} %`}
        </Text>
        <Progress.Track>
          <Progress.Range />
        </Progress.Track>
      </Progress.Root>
      {mayCancel && recording.status !== 'analysing' ? (
        // Above the link that covers the row.
        <Box position="relative" zIndex="1">
          <CancelReading recording={recording} />
        </Box>
      ) : null}
    </Flex>
  );
}
