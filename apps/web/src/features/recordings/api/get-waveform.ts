import { waveformSchema, type Recording } from '@overtally/contracts';
import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { requestJson } from '../../../lib/http.js';
import { isBusy } from '../recording-status.js';

export interface WaveformSpan {
  channel: number;
  fromS?: number;
  toS?: number;
  points?: number;
}

type Sampled = Pick<
  Recording,
  'id' | 'status' | 'sampleRateHz' | 'sampleCount' | 'channels' | 'latestAnalysisId'
>;

/** Changes whenever the samples may: on reading again, and with the scale of the channel. */
function revision(recording: Sampled, channelIndex: number) {
  const { sampleRateHz, sampleCount, latestAnalysisId } = recording;
  const channel = recording.channels.find(({ index }) => index === channelIndex);
  const { gain, offset, unit } = channel ?? {};
  return { sampleRateHz, sampleCount, latestAnalysisId, busy: isBusy(recording), gain, offset, unit };
}

/** Samples of a span, or their envelope where there are more than `points`. The old span stays until the new one is here. */
export const waveformQuery = (recording: Sampled, span: WaveformSpan) =>
  queryOptions({
    queryKey: ['recordings', recording.id, 'waveform', span, revision(recording, span.channel)],
    queryFn: ({ signal }) =>
      requestJson(waveformSchema, `/recordings/${recording.id}/waveform`, { query: { ...span }, signal }),
    placeholderData: keepPreviousData,
    staleTime: Infinity,
  });
