import { Button, Text } from '@chakra-ui/react';
import { useInfiniteQuery } from '@tanstack/react-query';
import { useDeferredValue, useState } from 'react';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { PickerDialog, type PickedChannel } from '../../../features/overlay/components/picker-dialog.js';
import { recordingsQuery } from '../../../features/recordings/api/list-recordings.js';

interface OverlayPickerProps {
  projectId: string;
  present: readonly PickedChannel[];
  onClose: () => void;
  onAdd: (channels: PickedChannel[]) => void;
}

/** The picker over the project's analysed recordings. */
export function OverlayPicker({ projectId, ...props }: OverlayPickerProps) {
  const [search, setSearch] = useState('');
  const q = useDeferredValue(search.trim());
  const found = useInfiniteQuery({
    ...recordingsQuery(projectId, { q, status: 'ready', sort: '-number' }),
    placeholderData: (before) => before,
  });
  const recordings = found.data?.pages.flatMap((page) => page.items) ?? [];
  return (
    <PickerDialog
      {...props}
      recordings={recordings}
      search={search}
      onSearch={setSearch}
      foot={
        found.isPending ? (
          <LoadingState label="Loading the recordings" />
        ) : found.isError ? (
          <ErrorState error={found.error} onRetry={() => void found.refetch()} />
        ) : found.hasNextPage ? (
          <Button mt="3" loading={found.isFetchingNextPage} onClick={() => void found.fetchNextPage()}>
            Show more
          </Button>
        ) : recordings.length === 0 ? (
          <Text color="inkSoft" py="3">
            {q
              ? 'No analysed recording matches.'
              : 'No recording has been analysed yet: upload one under Recordings.'}
          </Text>
        ) : null
      }
    />
  );
}
