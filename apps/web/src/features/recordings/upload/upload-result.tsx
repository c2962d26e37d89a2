import { Box, Link, Text } from '@chakra-ui/react';
import type { Recording, UploadOutcome } from '@overtally/contracts';
import { Fragment } from 'react';
import { Link as RouterLink } from 'react-router-dom';
import { formatSha256 } from '../../../lib/format.js';

interface UploadResultProps {
  outcome: UploadOutcome;
  sha256: string | null;
  recordingTo: (recordingId: string) => string;
}

/** What came of an upload: its recordings, what of an archive was left out and why, the checksum. */
export function UploadResult({ outcome: { items, leftOut }, sha256, recordingTo }: UploadResultProps) {
  const isArchive = items.length !== 1 || leftOut.length > 0;
  return (
    <Box>
      {isArchive ? (
        <Text>
          {counted(items.length, 'recording', 'recordings')}
          {leftOut.length > 0 ? `, ${leftOut.length} left out` : ''}
        </Text>
      ) : null}
      {items.length > 0 ? (
        <Text>
          {isArchive ? null : 'received as '}
          {items.map((recording, index) => (
            <Fragment key={recording.id}>
              {index > 0 ? ', ' : null}
              <Received recording={recording} recordingTo={recordingTo} />
            </Fragment>
          ))}
        </Text>
      ) : null}
      {leftOut.length > 0 ? (
        <details>
          <summary>What was left out</summary>
          <Box as="ul" listStyleType="none" fontSize="13px" color="inkSoft">
            {leftOut.map(({ path, reason }) => (
              <Box as="li" key={path} overflowWrap="anywhere">
                {path}: {reason}
              </Box>
            ))}
          </Box>
        </details>
      ) : null}
      {sha256 ? (
        <Text color="inkSoft" fontSize="xs" title={`SHA-256 ${sha256}`}>
          checked, SHA-256{' '}
          <Box as="span" fontFamily="mono">
            {formatSha256(sha256)}
          </Box>
        </Text>
      ) : null}
    </Box>
  );
}

function Received({
  recording,
  recordingTo,
}: { recording: Recording } & Pick<UploadResultProps, 'recordingTo'>) {
  const { id, number, duplicateOf } = recording;
  return (
    <>
      <Link asChild>
        <RouterLink to={recordingTo(id)}>{number}</RouterLink>
      </Link>
      {duplicateOf ? (
        <Box as="span" color="near">
          , the same file as{' '}
          <Link asChild>
            <RouterLink to={recordingTo(duplicateOf.id)}>{duplicateOf.number}</RouterLink>
          </Link>
        </Box>
      ) : null}
    </>
  );
}

const counted = (count: number, one: string, more: string): string => {
  if (count === 0) return `no ${one}`;
  return `${count} ${count === 1 ? one : more}`;
};
