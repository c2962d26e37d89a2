import { Button, Text } from '@chakra-ui/react';
import { holds, type Recording } from '@overtally/contracts';
import { useInfiniteQuery, useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { EmptyState } from '../../../components/empty-state.js';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { notifyDone, notifyProblem } from '../../../components/notify.js';
import { PageHeader } from '../../../components/page-header.js';
import { useAccount } from '../../../features/account/hooks/use-account.js';
import { limitSetsQuery } from '../../../features/limits/api/list-limit-sets.js';
import { useProject } from '../../../features/projects/hooks/use-project.js';
import { deleteRecording } from '../../../features/recordings/api/delete-recording.js';
import { recordingsQuery } from '../../../features/recordings/api/list-recordings.js';
import { compareRecording } from '../../../features/recordings/list/comparison.js';
import { ListToolbar } from '../../../features/recordings/list/list-toolbar.js';
import { RecordingTable } from '../../../features/recordings/list/recording-table.js';
import { useRecordingFilter } from '../../../features/recordings/list/use-recording-filter.js';
import { Intake } from '../../../features/recordings/upload/intake.js';
import { equipmentQuery } from '../../../lib/bench-queries.js';
import { paths } from '../../paths.js';
import { useProjectId } from '../../use-project-id.js';

export function Component() {
  const account = useAccount();
  const project = useProject(useProjectId());
  const navigate = useNavigate();
  const queryClient = useQueryClient();
  const { filter, limitSetId, change } = useRecordingFilter();
  const [selection, setSelection] = useState<ReadonlySet<string>>(new Set());
  const recordings = useInfiniteQuery(recordingsQuery(project.id, filter));
  const limitSets = useQuery(limitSetsQuery(project.id));
  const equipment = useQuery(equipmentQuery(project.id));
  const wanted = limitSetId ?? project.comparisonLimitSetId ?? 'none';
  const limitSet = limitSets.data?.find((set) => set.id === wanted) ?? null;
  const shown = recordings.data?.pages.flatMap((page) => page.items) ?? [];
  const mayUpload = holds('recording.upload', project.role, account.isAdministrator);
  const recordingTo = (recordingId: string) => paths.recording(project.id, recordingId);
  const remove = useMutation({
    mutationFn: (recording: Recording) => deleteRecording(recording.id),
    onSuccess: (_, recording) => notifyDone(`${recording.number} removed`),
    onError: (error) => notifyProblem('Not removed', error),
    onSettled: () => queryClient.invalidateQueries({ queryKey: ['projects', project.id] }),
  });
  const select = (recordingId: string, selected: boolean) =>
    setSelection((before) => {
      const next = new Set(before);
      if (selected) next.add(recordingId);
      else next.delete(recordingId);
      return next;
    });
  /** The chosen recordings, each with the channel that its row speaks of. */
  const overlaid = () =>
    [...selection].map((id) => {
      const recording = shown.find((candidate) => candidate.id === id);
      const channel = recording ? compareRecording(recording, limitSet).channel : null;
      return channel ? `${id}:${channel.channel}` : id;
    });
  const filtered = filter.q !== '' || filter.status !== null || filter.equipmentId !== null;
  return (
    <>
      <PageHeader
        title="Recordings"
        subtitle={countWords(project.counts.recordings, shown, limitSet)}
        documentTitle={`Recordings, ${project.name}`}
        actions={
          <Button
            disabled={selection.size < 2}
            onClick={() => void navigate(paths.overlay(project.id, overlaid()))}
          >
            {selection.size < 2 ? 'Choose two or more to overlay' : `Overlay ${selection.size} recordings`}
          </Button>
        }
      />
      {mayUpload ? (
        <Intake projectId={project.id} recordingTo={recordingTo} onRemoveCopy={remove.mutate} />
      ) : null}
      {recordings.isPending ? <LoadingState label="Loading the recordings" /> : null}
      {recordings.isError ? (
        <ErrorState error={recordings.error} onRetry={() => void recordings.refetch()} />
      ) : null}
      {recordings.isSuccess && shown.length === 0 && !filtered ? <NoneYet mayUpload={mayUpload} /> : null}
      {recordings.isSuccess && (shown.length > 0 || filtered) ? (
        <>
          <ListToolbar
            filter={filter}
            limitSets={limitSets.data ?? []}
            limitSetId={limitSet?.id ?? ''}
            equipment={equipment.data ?? []}
            onChange={change}
          />
          {shown.length > 0 ? (
            <RecordingTable
              recordings={shown}
              limitSet={limitSet}
              recordingTo={recordingTo}
              selection={selection}
              onSelect={select}
              mayCancel={holds('recording.update', project.role, account.isAdministrator)}
            />
          ) : (
            <EmptyState
              title="No recording matches"
              actions={<Button onClick={() => change({ q: '', status: '', equipment: '' })}>Show all</Button>}
            >
              Numbers, names, equipment and file names are searched.
            </EmptyState>
          )}
          {limitSet ? (
            <Text color="inkSoft" fontSize="13px" mt="2">
              Compared by value with {limitSet.title}, edition {limitSet.edition}. A comparison is not a
              verdict.
            </Text>
          ) : null}
        </>
      ) : null}
      {recordings.hasNextPage ? (
        <Button
          mt="3"
          loading={recordings.isFetchingNextPage}
          onClick={() => void recordings.fetchNextPage()}
        >
          Show more
        </Button>
      ) : null}
    </>
  );
}

function NoneYet({ mayUpload }: { mayUpload: boolean }) {
  return (
    <EmptyState title="No recording yet">
      {mayUpload
        ? 'Drop the captures of a bench session above. Each becomes a sheet with its spectrum, harmonics and flags.'
        : 'Technicians of the project upload captures; they show up here as soon as they arrive.'}
    </EmptyState>
  );
}

/** "14 recordings, 3 over the limit" */
function countWords(
  total: number,
  shown: readonly Recording[],
  limitSet: Parameters<typeof compareRecording>[1],
): string {
  const all = total === 1 ? '1 recording' : `${total} recordings`;
  const over = shown.filter((recording) => compareRecording(recording, limitSet).tone === 'over').length;
  const failed = shown.filter((recording) => recording.status === 'failed').length;
  return [all, over > 0 ? `${over} over the limit` : '', failed > 0 ? `${failed} with a problem` : '']
    .filter(Boolean)
    .join(', ');
}
