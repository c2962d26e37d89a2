import type { ToneOptions } from '../tone/tone-result.js';
import type { ChannelDescription, ResolvedSettings } from '../types.js';

/** Options of the tone figures of a channel: full scale is half the span of its integer format, where it has one. */
export function toneOptions({
  channel: { lowestCode, highestCode },
  settings,
}: {
  channel: ChannelDescription;
  settings: ResolvedSettings;
}): ToneOptions {
  return {
    maxOrder: settings.thdMaxOrder,
    fullScalePeak: fullScalePeak(lowestCode, highestCode),
    band: settings.bandHz,
  };
}

/** Ends of a two's complement format lie one step apart from symmetry; beyond this share of the span it is an offset. */
const SYMMETRIC_SHARE = 0.01;

/** Peak of a full-scale sine: the larger end of a symmetric format (code 2^(bits − 1)), half the span of a shifted one. */
function fullScalePeak(lowest: number | undefined, highest: number | undefined): number | undefined {
  if (lowest === undefined || highest === undefined || lowest === highest) return undefined;
  const span = Math.abs(highest - lowest);
  const symmetric = Math.abs(lowest + highest) <= SYMMETRIC_SHARE * span;
  return symmetric ? Math.max(Math.abs(lowest), Math.abs(highest)) : span / 2;
}
