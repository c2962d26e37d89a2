import type { ChannelAnalysis, Series } from '@overtally/contracts';

/** Length of an interval over which cycles are counted, in seconds (IEC 61000-4-30, 5.1). */
const countedOverS = 10;

/** The counted frequency in the form of a series. */
export function countedSeries({ index, countedFrequency }: ChannelAnalysis): Series {
  return {
    ...{ channel: index, figure: 'frequency', order: null, unit: 'Hz', aggregation: 'window' },
    intervalS: countedOverS,
    timeS: countedFrequency.map(({ startS }) => startS),
    value: countedFrequency.map(({ frequencyHz }) => frequencyHz),
    flagged: countedFrequency.map(() => false),
    thinned: false,
  };
}
