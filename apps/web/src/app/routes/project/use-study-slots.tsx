import { Link } from '@chakra-ui/react';
import type { LimitSet, Recording, StudyInput } from '@overtally/contracts';
import { useQuery, useQueryClient } from '@tanstack/react-query';
import { Link as RouterLink } from 'react-router-dom';
import { JudgementFields } from '../../../features/limits/components/judgement-fields.js';
import { analysisQuery } from '../../../features/recordings/api/get-analysis.js';
import { allRecordingsQuery } from '../../../features/recordings/api/list-all-recordings.js';
import { ChannelInput } from '../../../features/studies/components/channel-input.js';
import type { StudySlots } from '../../../features/studies/components/study-desk.js';
import { paths } from '../../paths.js';

/** What a study takes from other parts of the product: recordings to begin with, and limits to judge by. */
export function useStudySlots(
  projectId: string,
  input: StudyInput,
  limitSets: readonly LimitSet[],
): { slots: StudySlots; analysed: Recording[] } {
  const queryClient = useQueryClient();
  const recordings = useQuery(allRecordingsQuery(projectId));
  const analysed = (recordings.data ?? []).filter(({ latestAnalysisId }) => latestAnalysisId !== null);
  const source = useQuery({
    ...analysisQuery(input.kind === 'channel' ? input.analysisId : ''),
    enabled: input.kind === 'channel',
  });
  const recording = analysed.find(({ id }) => id === source.data?.recordingId);
  const channel = source.data?.channels.find(
    ({ index }) => input.kind === 'channel' && index === input.channel,
  );
  const slots: StudySlots = {
    source: recording ? (
      <>
        <Link asChild>
          <RouterLink to={paths.recording(projectId, recording.id)}>{recording.number}</RouterLink>
        </Link>
        {`, channel ${channel?.name ?? ''}. `}
      </>
    ) : null,
    channelInput: (
      <ChannelInput
        recordings={analysed}
        load={async (analysisId, index) => {
          const analysis = await queryClient.fetchQuery(analysisQuery(analysisId));
          const found = analysis.channels.find((each) => each.index === index);
          if (!found) throw new Error('The newest analysis does not have this channel; analyse it anew.');
          return found;
        }}
      />
    ),
    judgement: (props) => <JudgementFields {...props} limitSets={limitSets} rest={{ of: 'both' }} />,
  };
  return { slots, analysed };
}
