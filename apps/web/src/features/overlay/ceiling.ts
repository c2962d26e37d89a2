import type { LimitSet } from '@overtally/contracts';
import { limitForOrder, shownLimits } from '@overtally/limits';
import type { OrderLimit } from '../../components/charts/limit-ceiling.js';
import type { OverlayView } from './overlay-link.js';
import { commonQuantity, gainOf, type OverlaySeries } from './series.js';

export interface Ceiling {
  limits: OrderLimit[];
  /** Why no ceiling is drawn; null when there is one, or none is asked for. */
  gap: string | null;
}

/** Sets that can stand over all channels of the overlay: those of their common quantity. */
export function setsFor(series: readonly OverlaySeries[], sets: readonly LimitSet[]): LimitSet[] {
  const quantity = commonQuantity(series);
  return sets.filter((set) => set.quantity === quantity);
}

const none = (gap: string | null): Ceiling => ({ limits: [], gap });

/**
 * One ceiling over all channels, in the unit of the axis. Limits in percent of the fundamental hold for every
 * channel only on a relative axis, absolute ones only on an absolute axis; a single channel has its ceiling
 * either way.
 */
export function ceilingFor(
  set: LimitSet | null,
  series: readonly OverlaySeries[],
  amplitude: OverlayView['amplitude'],
): Ceiling {
  const [first] = series;
  if (!set || !first) return none(null);
  if (set.parameters.length > 0) {
    return none('This set needs figures of each equipment: judge the channels on their own sheets.');
  }
  const ofFundamental = set.basis === 'percent-of-fundamental';
  if (series.length > 1 && ofFundamental !== (amplitude === 'relative')) {
    return none(
      ofFundamental
        ? 'Limits in % of the fundamental differ from channel to channel here: switch to relative to see one ceiling.'
        : `Limits in ${set.unit} differ from channel to channel here: switch to absolute to see one ceiling.`,
    );
  }
  const { summary } = first;
  const gain = gainOf(summary, amplitude);
  const context = { fundamentalRms: summary.harmonicRms[0] ?? null, parameters: {}, unit: summary.unit };
  const limits = shownLimits(set).orders.flatMap(({ order }) => {
    const limit = limitForOrder(set, order, context);
    return limit === null || gain === null ? [] : [{ order, limit: limit * gain }];
  });
  if (limits.length > 0) return { limits, gap: null };
  return none(
    `The limits are in ${set.unit} and cannot be put over a channel in ${summary.unit || 'no unit'}.`,
  );
}
