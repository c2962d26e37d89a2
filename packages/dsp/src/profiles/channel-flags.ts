import type { WindowSynchronism } from '../flags/not-synchronous.js';
import { qualityFlags } from '../flags/quality-flags.js';
import { meanFrequencyHz } from '../fundamental/local-frequency.js';
import type { MeasuredChannel } from '../stages/measure-channels.js';
import { windowCount } from '../stages/window-grid.js';
import type { Flag } from '../types.js';

/** All quality flags of a channel. */
export function channelFlags(
  { survey, scan, spectrum, frequencyHz, orders, grid }: MeasuredChannel,
  windows: WindowSynchronism | null,
): Flag[] {
  const { context, track } = survey;
  const { figures, findings } = scan;
  const { settings, sampleRateHz, channel } = context;
  const fundamental =
    frequencyHz === null || orders === null || grid === null
      ? null
      : { frequencyHz, rms: orders.rms[0]!, listedOrders: grid.orders };
  return qualityFlags({
    findings,
    sampleRateHz,
    unit: channel.unit,
    nominalFrequencyHz: settings.nominalFrequencyHz,
    maxOrder: settings.maxOrder,
    mean: fundamental && orders ? orders.dc : figures.mean,
    acRms: Math.sqrt(Math.max(0, figures.rms ** 2 - figures.mean ** 2)),
    fundamental,
    track,
    spectrum,
    windows,
  });
}

/** What the windows of a channel miss of whole cycles of its own fundamental; null where that is not known. */
export function windowSynchronism({
  survey: { context, track },
  grid,
  windows,
}: MeasuredChannel): WindowSynchronism | null {
  if (grid === null || windows === null || track === null) return null;
  const { boundaries, cycles } = grid;
  const { sampleRateHz } = context;
  const errorPercent = Float64Array.from({ length: windowCount(grid) }, (_, j) => {
    const [from, to] = [boundaries[j]!, boundaries[j + 1]!];
    const held = (meanFrequencyHz(track, sampleRateHz, from, to) * (to - from)) / sampleRateHz;
    return 100 * Math.abs(held / cycles - 1);
  });
  return { starts: boundaries.slice(0, -1), errorPercent };
}
