import { Button, Text } from '@chakra-ui/react';
import type { UnfinishedUpload } from '@overtally/contracts';
import { formatDateTime } from '../../../lib/format-date.js';
import { formatBytes } from '../../../lib/format.js';
import { RowGrid } from './row-grid.js';
import { percentOf } from './upload-words.js';

interface UnfinishedRowProps {
  upload: UnfinishedUpload;
  onDiscard: (upload: UnfinishedUpload) => void;
}

/** An upload that broke off, with what it takes to go on. */
export function UnfinishedRow({ upload, onDiscard }: UnfinishedRowProps) {
  const { fileName, sizeBytes, receivedBytes, expiresAt } = upload;
  const isWhole = receivedBytes >= sizeBytes;
  return (
    <RowGrid
      name={fileName}
      sizeBytes={sizeBytes}
      actions={
        <Button size="xs" aria-label={`Discard ${fileName}`} onClick={() => onDiscard(upload)}>
          Discard
        </Button>
      }
    >
      <Text>
        {isWhole
          ? 'Drop the file again to finish: all of it has arrived'
          : `Drop the file again to go on at ${percentOf(receivedBytes / sizeBytes)}`}
      </Text>
      <Text color="inkSoft" fontSize="xs">
        {formatBytes(receivedBytes)} of {formatBytes(sizeBytes)} received, kept until{' '}
        {formatDateTime(expiresAt)}
      </Text>
    </RowGrid>
  );
}
