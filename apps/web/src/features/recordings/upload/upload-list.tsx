import { Box, Button, Flex, Grid, Link, Progress, Text } from '@chakra-ui/react';
import { Link as RouterLink } from 'react-router-dom';
import { Sheet } from '../../../components/sheet.js';
import { problemText } from '../../../lib/api-problem.js';
import { formatBytes } from '../../../lib/format.js';
import { isOpen, type UploadItem, type UploadQueue } from '../upload-queue.js';

interface UploadListProps {
  queue: UploadQueue;
  items: readonly UploadItem[];
  recordingTo: (recordingId: string) => string;
  /** Opens the import form for a file that was left out. */
  onLookAgain: (item: UploadItem) => void;
  /** Removes a recording that turned out to be a copy. */
  onRemoveCopy: (item: UploadItem) => void;
}

/** Uploads under way and just ended, each with its progress, its way out, and what came of it. */
export function UploadList({ queue, items, recordingTo, onLookAgain, onRemoveCopy }: UploadListProps) {
  if (items.length === 0) return null;
  const open = items.filter(isOpen);
  return (
    <Sheet as="section" aria-label="Uploads" px="4" py="3" mb="3">
      <Flex justify="space-between" align="baseline" gap="4" wrap="wrap">
        <Text role="status" fontFamily="mono" fontSize="13px">
          {summary(items)}
        </Text>
        {open.length > 0 ? (
          <Button size="xs" onClick={() => queue.stopAll()}>
            Stop all
          </Button>
        ) : (
          <Button size="xs" onClick={() => queue.clear()}>
            Clear the list
          </Button>
        )}
      </Flex>
      <Box as="ul" listStyleType="none">
        {items.map((item) => (
          <Grid
            as="li"
            key={item.id}
            templateColumns={{ base: 'minmax(0, 1fr) auto', md: 'minmax(0, 1fr) minmax(0, 2fr) 150px' }}
            alignItems="center"
            columnGap="4"
            rowGap="1"
            borderTopWidth="1px"
            borderColor="rule"
            mt="2"
            pt="2"
          >
            <Text overflowWrap="anywhere">
              {item.file.name}{' '}
              <Box as="span" color="inkSoft" fontSize="13px">
                {formatBytes(item.file.size)}
              </Box>
            </Text>
            <Box gridColumn={{ base: '1 / -1', md: 'auto' }} gridRow={{ base: 2, md: 'auto' }}>
              <Outcome item={item} recordingTo={recordingTo} />
            </Box>
            <Flex justify="flex-end">
              <Actions item={item} queue={queue} onLookAgain={onLookAgain} onRemoveCopy={onRemoveCopy} />
            </Flex>
          </Grid>
        ))}
      </Box>
    </Sheet>
  );
}

function Outcome({ item, recordingTo }: { item: UploadItem; recordingTo: UploadListProps['recordingTo'] }) {
  if (item.state === 'waiting') return <Text color="inkSoft">waits for its turn</Text>;
  if (item.state === 'left-out') return <Text color="near">left out, not sent</Text>;
  if (item.state === 'stopped') return <Text color="inkSoft">stopped, nothing was kept</Text>;
  if (item.state === 'failed') {
    return (
      <Text role="alert" color="over">
        Not received: {problemText(item.error)}
      </Text>
    );
  }
  if (item.state === 'sending') {
    const share = item.file.size > 0 ? Math.round((100 * item.sentBytes) / item.file.size) : 0;
    return (
      <Progress.Root value={share} size="xs" colorPalette="act" aria-label={`Sending ${item.file.name}`}>
        <Progress.Track>
          <Progress.Range />
        </Progress.Track>
      </Progress.Root>
    );
  }
  const { recording } = item;
  if (!recording) return null;
  return (
    <Text>
      received as{' '}
      <Link asChild>
        <RouterLink to={recordingTo(recording.id)}>{recording.number}</RouterLink>
      </Link>
      {recording.duplicateOf ? (
        <Box as="span" color="near">
          , the same file as{' '}
          <Link asChild>
            <RouterLink to={recordingTo(recording.duplicateOf.id)}>{recording.duplicateOf.number}</RouterLink>
          </Link>
        </Box>
      ) : null}
    </Text>
  );
}

function Actions({
  item,
  queue,
  onLookAgain,
  onRemoveCopy,
}: Pick<UploadListProps, 'queue' | 'onLookAgain' | 'onRemoveCopy'> & { item: UploadItem }) {
  if (isOpen(item)) {
    return (
      <Button size="xs" aria-label={`Stop ${item.file.name}`} onClick={() => queue.stop(item.id)}>
        Stop
      </Button>
    );
  }
  if (item.state === 'left-out') {
    return (
      <Button size="xs" aria-label={`Look into ${item.file.name} again`} onClick={() => onLookAgain(item)}>
        Look again
      </Button>
    );
  }
  if (item.state === 'failed' || item.state === 'stopped') {
    return (
      <Button size="xs" aria-label={`Send ${item.file.name} again`} onClick={() => queue.retry(item.id)}>
        Send again
      </Button>
    );
  }
  if (item.recording?.duplicateOf) {
    return (
      <Button size="xs" onClick={() => onRemoveCopy(item)}>
        Remove this copy
      </Button>
    );
  }
  return null;
}

/** "2 uploading, 41.8 MB of 96.0 MB" */
function summary(items: readonly UploadItem[]): string {
  const open = items.filter(isOpen);
  if (open.length === 0) {
    const arrived = items.filter((item) => item.state === 'done').length;
    return `${arrived} of ${items.length} received`;
  }
  const sent = open.reduce((sum, item) => sum + item.sentBytes, 0);
  const total = open.reduce((sum, item) => sum + item.file.size, 0);
  return `${open.length} uploading, ${formatBytes(Math.round(sent))} of ${formatBytes(total)}`;
}
