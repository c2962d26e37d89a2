import type { Recording, Verdict } from '@overtally/contracts';
import { verdictWords } from '../../components/verdict/verdict-words.js';

/** What a choice of verdicts has to know of a recording. */
export type RecordingName = Pick<Recording, 'id' | 'number' | 'name' | 'eut'>;

export interface VerdictGroup {
  recording: RecordingName;
  verdicts: Verdict[];
}

/**
 * Verdicts by recording, recordings in rising number, verdicts in their given order. With a search only those
 * that hold every word of it in the recording, the channel, the limit set or the result.
 */
export function groupVerdicts(
  verdicts: readonly Verdict[],
  recordings: readonly RecordingName[],
  search = '',
): VerdictGroup[] {
  const words = search.toLocaleLowerCase().split(/\s+/).filter(Boolean);
  const groups = recordings.map((recording) => ({
    recording,
    verdicts: verdicts.filter((verdict) => {
      if (verdict.recordingId !== recording.id) return false;
      const text = textOf(verdict, recording);
      return words.every((word) => text.includes(word));
    }),
  }));
  return groups
    .filter((group) => group.verdicts.length > 0)
    .toSorted((a, b) => a.recording.number.localeCompare(b.recording.number, undefined, { numeric: true }));
}

function textOf({ channelName, limitSet, result }: Verdict, { number, name, eut }: RecordingName): string {
  return [number, name, eut, channelName, limitSet.standard, limitSet.title, verdictWords[result]]
    .join(' ')
    .toLocaleLowerCase();
}
