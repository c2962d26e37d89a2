import { waveformSchema } from '@overtally/contracts';
import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { requestJson } from '../../../lib/http.js';

export interface WaveformSpan {
  channel: number;
  fromS?: number;
  toS?: number;
  points?: number;
}

/** Samples of a span, or their envelope where there are more than `points`. The old span stays until the new one is here. */
export const waveformQuery = (recordingId: string, span: WaveformSpan) =>
  queryOptions({
    queryKey: ['recordings', recordingId, 'waveform', span],
    queryFn: ({ signal }) =>
      requestJson(waveformSchema, `/recordings/${recordingId}/waveform`, { query: { ...span }, signal }),
    placeholderData: keepPreviousData,
    staleTime: Infinity,
  });
