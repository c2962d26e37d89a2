import type { ChannelAnalysis } from '@overtally/contracts';

type Windows = NonNullable<ChannelAnalysis['windows']>;
type Harmonic = ChannelAnalysis['harmonics'][number];
type Flag = ChannelAnalysis['flags'][number];
type Optional<T, K extends keyof T> = Omit<T, K> & Partial<Pick<T, K>>;

/** Figures of a channel as some earlier engine left them: what was not computed then is absent. */
export type EarlierChannel = Optional<
  Omit<ChannelAnalysis, 'windows' | 'harmonics' | 'flags'>,
  'tone' | 'distortion' | 'bands' | 'countedFrequency' | 'lines' | 'families' | 'uncertainty'
> & {
  windows: Optional<Windows, 'flaggedCount' | 'synchronisationErrorPercent' | 'gridChannel'> | null;
  harmonics: Optional<Harmonic, 'uncertainty' | 'groupStatistics' | 'subgroupStatistics'>[];
  flags: Optional<Flag, 'evidence'>[];
};

/**
 * The figures of a channel with every field of today: null or empty where an earlier engine computed nothing. That
 * engine kept no window out of its figures and let each channel set its own windows.
 */
export function completed(channel: EarlierChannel): ChannelAnalysis {
  const { windows, harmonics, flags } = channel;
  return {
    tone: null,
    distortion: null,
    bands: [],
    countedFrequency: [],
    lines: [],
    families: [],
    uncertainty: {},
    ...channel,
    windows: windows && {
      flaggedCount: 0,
      synchronisationErrorPercent: null,
      gridChannel: channel.index,
      ...windows,
    },
    harmonics: harmonics.map((harmonic) => ({
      uncertainty: null,
      groupStatistics: null,
      subgroupStatistics: null,
      ...harmonic,
    })),
    flags: flags.map((flag) => ({ evidence: null, ...flag })),
  };
}
