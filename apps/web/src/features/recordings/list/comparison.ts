import type { ChannelSummary, LimitSet, Recording } from '@overtally/contracts';
import { sharesOfSummary } from '@overtally/limits';
import { tallyWords, type OrderShare } from '../../../components/tally-geometry.js';

/** How a recording stands against a limit set, by the channel that comes nearest to its limits. */
export interface Comparison {
  /** Channel that the row's figures belong to; null while nothing is analysed. */
  channel: ChannelSummary | null;
  /** Channels of the set's quantity that were compared. */
  compared: number;
  shares: OrderShare[];
  words: string;
  tone: 'over' | 'within' | 'inkSoft';
}

const worst = (shares: readonly OrderShare[]): number =>
  Math.max(-1, ...shares.map((share) => share.sharePercent ?? -1));

function without(channel: ChannelSummary | null, words: string): Comparison {
  return { channel, compared: 0, shares: [], words, tone: 'inkSoft' };
}

/** Compares the latest figures of a recording with a set; a comparison of values, not a verdict. */
export function compareRecording(recording: Pick<Recording, 'summaries'>, set: LimitSet | null): Comparison {
  const first = recording.summaries[0] ?? null;
  if (!set) return without(first, 'not compared');
  const fitting = recording.summaries.filter((summary) => summary.quantity === set.quantity);
  if (fitting.length === 0) return without(first, first ? `no ${set.quantity} channel` : '');
  if (set.parameters.length > 0) return without(fitting[0] ?? null, 'judged on its sheet only');
  const [nearest] = fitting
    .map((channel) => ({ channel, shares: sharesOfSummary(set, channel) }))
    .toSorted((a, b) => worst(b.shares) - worst(a.shares));
  if (!nearest) return without(first, '');
  const over = worst(nearest.shares) > 100;
  const measured = nearest.channel.harmonicRms.length;
  const unmeasured = set.orders.some(({ order }) => order > measured);
  const words = tallyWords(nearest.shares);
  return {
    ...nearest,
    compared: fitting.length,
    words: unmeasured ? `${words} to order ${measured}, the rest not measured` : words,
    tone: over ? 'over' : unmeasured || worst(nearest.shares) < 0 ? 'inkSoft' : 'within',
  };
}
