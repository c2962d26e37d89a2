import { Box, Button, Flex, Text, VisuallyHidden } from '@chakra-ui/react';
import type { UnfinishedUpload } from '@overtally/contracts';
import { Sheet } from '../../../components/sheet.js';
import { isOpen, isRunning, mayPause, mayStop, type UploadItem } from '../upload-item.js';
import type { UploadQueue } from '../upload-queue.js';
import { ThinProgress } from './thin-progress.js';
import { UnfinishedRow } from './unfinished-row.js';
import { UploadRow } from './upload-row.js';
import { countWords, progressWords, spokenStatus, totalsOf } from './upload-words.js';

interface UploadListProps {
  queue: UploadQueue;
  items: readonly UploadItem[];
  /** Uploads that broke off and are not on the list. */
  unfinished: readonly UnfinishedUpload[];
  recordingTo: (recordingId: string) => string;
  onDiscard: (upload: UnfinishedUpload) => void;
  /** Removes a recording that turned out to be a copy. */
  onRemoveCopy: (item: UploadItem) => void;
}

/** Uploads under way, just ended and broken off, each with its progress, its way out, and what came of it. */
export function UploadList({
  queue,
  items,
  unfinished,
  recordingTo,
  onDiscard,
  onRemoveCopy,
}: UploadListProps) {
  return (
    <>
      <VisuallyHidden role="status">{items.length > 0 ? spokenStatus(items) : ''}</VisuallyHidden>
      {items.length > 0 || unfinished.length > 0 ? (
        <Sheet as="section" aria-label="Uploads" px="4" pt="3" pb="2" mb="3">
          {items.length > 0 ? <Summary queue={queue} items={items} /> : null}
          <Box
            as="ul"
            listStyleType="none"
            maxH={items.length > 12 ? '60vh' : undefined}
            overflowY={items.length > 12 ? 'auto' : undefined}
          >
            {items.map((item) => (
              <UploadRow
                key={item.id}
                item={item}
                queue={queue}
                recordingTo={recordingTo}
                onRemoveCopy={onRemoveCopy}
              />
            ))}
          </Box>
          {unfinished.length > 0 ? (
            <>
              <Text fontWeight="600" fontSize="13px" mt={items.length > 0 ? '3' : '0'}>
                Broken off
              </Text>
              <Box as="ul" listStyleType="none">
                {unfinished.map((upload) => (
                  <UnfinishedRow key={upload.id} upload={upload} onDiscard={onDiscard} />
                ))}
              </Box>
            </>
          ) : null}
        </Sheet>
      ) : null}
    </>
  );
}

function Summary({ queue, items }: Pick<UploadListProps, 'queue' | 'items'>) {
  const { sentBytes, totalBytes, speed } = totalsOf(items);
  const isBusy = items.some(isOpen);
  return (
    <Box mb="2">
      <Flex justify="space-between" align="center" gap="4" rowGap="2" wrap="wrap" mb={isBusy ? '2' : '0'}>
        <Text fontFamily="mono" fontSize="13px">
          {countWords(items)}
          {items.some(isRunning) ? (
            <Box as="span" color="inkSoft">
              {' · '}
              {progressWords(sentBytes, totalBytes, speed)}
            </Box>
          ) : null}
        </Text>
        <Flex gap="2">
          {items.some(mayPause) ? (
            <Button size="xs" onClick={() => queue.pauseAll()}>
              Pause all
            </Button>
          ) : null}
          {items.some(({ state }) => state === 'paused') ? (
            <Button size="xs" onClick={() => queue.resumeAll()}>
              Go on with all
            </Button>
          ) : null}
          {items.some(mayStop) ? (
            <Button size="xs" onClick={() => queue.stopAll()}>
              Stop all
            </Button>
          ) : null}
          {isBusy ? null : (
            <Button size="xs" onClick={() => queue.clear()}>
              Clear the list
            </Button>
          )}
        </Flex>
      </Flex>
      {isBusy && items.length > 1 ? (
        <ThinProgress label="All uploads" share={totalBytes > 0 ? sentBytes / totalBytes : 0} />
      ) : null}
    </Box>
  );
}
