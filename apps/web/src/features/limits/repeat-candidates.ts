import type { ChannelAnalysis, Recording, Repeat } from '@overtally/contracts';

/** Most repeats that one verdict takes beside the recording it is on. */
export const mostRepeats = 20;

/** A recording of the project that may be a repeat. */
export type RepeatCandidate = Pick<Recording, 'id' | 'number' | 'name' | 'latestAnalysisId' | 'summaries'>;

export interface FittingRepeat {
  repeat: Repeat;
  recordingNumber: string;
  recordingName: string;
  channelName: string;
  rms: number;
  unit: string;
  /** What a search looks in, in lower case. */
  words: string;
}

/** Channels of the candidates that are of the quantity and unit of the channel judged. */
export function fittingRepeats(
  candidates: readonly RepeatCandidate[],
  { quantity, unit }: Pick<ChannelAnalysis, 'quantity' | 'unit'>,
): FittingRepeat[] {
  return candidates.flatMap(({ number, name, latestAnalysisId: analysisId, summaries }) =>
    analysisId === null
      ? []
      : summaries
          .filter((channel) => channel.quantity === quantity && channel.unit === unit)
          .map((channel) => ({
            repeat: { analysisId, channel: channel.channel },
            recordingNumber: number,
            recordingName: name,
            channelName: channel.name,
            rms: channel.rms,
            unit,
            words: `${number} ${name} ${channel.name}`.toLocaleLowerCase(),
          })),
  );
}
