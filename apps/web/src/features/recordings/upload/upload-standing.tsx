import { Box, Text } from '@chakra-ui/react';
import { problemText } from '../../../lib/api-problem.js';
import type { UploadItem } from '../upload-item.js';
import { isPassing } from '../api/upload-transfer.js';
import { ThinProgress } from './thin-progress.js';
import { UploadResult } from './upload-result.js';
import { percentOf, progressWords, shareOf } from './upload-words.js';

interface UploadStandingProps {
  item: UploadItem;
  recordingTo: (recordingId: string) => string;
}

/** How an upload stands, or what came of it. */
export function UploadStanding({ item, recordingTo }: UploadStandingProps) {
  const { state, file, error, outcome } = item;
  switch (state) {
    case 'looking':
      return <Soft>is being looked into</Soft>;
    case 'asking':
      return <Text color="near">waits for how it is to be read</Text>;
    case 'waiting':
      return (
        <Soft>waits for its turn{item.sentBytes > 0 ? `, goes on at ${percentOf(shareOf(item))}` : ''}</Soft>
      );
    case 'sending':
      return (
        <Moving item={item}>
          <Soft mono>{progressWords(item.sentBytes, file.size, item.speed)}</Soft>
        </Moving>
      );
    case 'interrupted':
      return (
        <Moving item={item} held>
          <Text color="near">
            {isPassing(error) && error.status > 0 ? 'The server is busy' : 'Connection lost'}, trying again.
            It goes on where it stopped.
          </Text>
        </Moving>
      );
    case 'paused':
      return (
        <Moving item={item} held>
          <Soft>paused at {percentOf(shareOf(item))}</Soft>
        </Moving>
      );
    case 'finishing':
      return (
        <Moving item={item}>
          <Soft>
            {item.sha256 === null
              ? 'Arrived; its checksum is being worked out'
              : isArchiveName(file.name)
                ? 'Arrived; the server compares the checksum and unpacks it'
                : 'Arrived; the server compares the checksum'}
          </Soft>
        </Moving>
      );
    case 'done':
      return outcome ? (
        <UploadResult outcome={outcome} sha256={item.sha256} recordingTo={recordingTo} />
      ) : null;
    case 'failed':
      return (
        <Text role="alert" color="over">
          Not received: {problemText(error)}
        </Text>
      );
    case 'stopped':
      return (
        <Soft>
          {item.url === null
            ? 'stopped, nothing was kept'
            : error
              ? 'stopped; the server could not be told to drop what it has'
              : 'stopped'}
        </Soft>
      );
    case 'left-out':
      return <Text color="near">left out, not sent{item.reason ? `: ${item.reason}` : ''}</Text>;
  }
}

const isArchiveName = (name: string): boolean => /\.(zip|npz)$/i.test(name);

function Soft({ children, mono = false }: { children: React.ReactNode; mono?: boolean }) {
  return (
    <Text color="inkSoft" {...(mono ? { fontFamily: 'mono', fontSize: 'xs' } : {})}>
      {children}
    </Text>
  );
}

function Moving({ item, held, children }: { item: UploadItem; held?: boolean; children: React.ReactNode }) {
  return (
    <Box>
      <ThinProgress label={`Sending ${item.file.name}`} share={shareOf(item)} held={held ?? false} />
      <Box mt="1">{children}</Box>
    </Box>
  );
}
