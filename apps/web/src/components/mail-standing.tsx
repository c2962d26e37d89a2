import { Box, Text } from '@chakra-ui/react';
import type { Mail } from '@overtally/contracts';
import { formatDateTime } from '../lib/format-date.js';

const words = { queued: 'waits', sent: 'sent', failed: 'failed' } as const;

/** How a message fares: sent and when, or why it was not yet. */
export function MailStanding({ mail }: { mail: Pick<Mail, 'status' | 'sentAt' | 'attempts' | 'lastError'> }) {
  const { status, sentAt, attempts, lastError } = mail;
  const tone = { queued: attempts > 0 ? 'near' : undefined, sent: undefined, failed: 'over' }[status];
  return (
    <Box>
      <Text color={tone} fontWeight={tone ? '600' : '400'}>
        {status === 'sent' ? `sent ${formatDateTime(sentAt)}` : words[status]}
        {status !== 'sent' && attempts > 0
          ? `, ${attempts === 1 ? '1 attempt' : `${attempts} attempts`}`
          : ''}
      </Text>
      {lastError ? (
        <Text fontSize="13px" color="inkSoft" overflowWrap="anywhere">
          {lastError}
        </Text>
      ) : null}
    </Box>
  );
}
