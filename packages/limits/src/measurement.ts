import type { ChannelAnalysis, Harmonic, Quantity } from '@overtally/contracts';

/** What a limit set is applied to: one channel, all amounts rms in its unit. */
export interface Measurement {
  quantity: Quantity;
  unit: string;
  /** Total rms: the input current of the 0.6 % floor. */
  rms: number | null;
  fundamentalRms: number | null;
  harmonics: {
    order: number;
    /** Value compared with the limit. */
    mean: number;
    /** Largest 1.5 s smoothed value; null when there were no synchronous windows. */
    smoothedMax: number | null;
  }[];
  /** Orders above this one cannot be measured at the record's sample rate. */
  highestMeasurableOrder: number;
}

const meanOfCurrent = (harmonic: Harmonic): number =>
  harmonic.smoothedMeanRms ?? harmonic.groupRms ?? harmonic.rms;
const meanOfOther = (harmonic: Harmonic): number => harmonic.subgroupRms ?? harmonic.rms;

/** What the orders and totals of a judged channel are made of, in words; see `measurementOfChannel`. */
export function basisOfChannel({ quantity, harmonics }: ChannelAnalysis): string {
  const has = (figure: 'smoothedMeanRms' | 'groupRms' | 'subgroupRms') =>
    harmonics.some((harmonic) => harmonic[figure] !== null);
  if (quantity !== 'current') return has('subgroupRms') ? 'subgroups' : 'single lines';
  if (has('smoothedMeanRms')) return 'smoothed groups';
  return has('groupRms') ? 'groups' : 'single lines';
}

/**
 * The measurement that limits are applied to, from the analysis of a channel.
 *
 * Currents: mean of the 1.5 s smoothed groups (IEC 61000-4-7, 5.5.1, as IEC 61000-3-2 asks), else the group,
 * else the single line. Everything else: subgroups (IEC 61000-4-30 for voltages), else the single line.
 * An order counts as measurable below half the sample rate: samples per cycle come from the synchronous
 * windows; without windows the highest order listed is taken.
 */
export function measurementOfChannel(channel: ChannelAnalysis): Measurement {
  const mean = channel.quantity === 'current' ? meanOfCurrent : meanOfOther;
  const highestListed = channel.harmonics.reduce((highest, { order }) => Math.max(highest, order), 0);
  const samplesPerCycle = channel.windows ? channel.windows.samplesPerWindow / channel.windows.cycles : null;
  return {
    quantity: channel.quantity,
    unit: channel.unit,
    rms: channel.rms,
    fundamentalRms: channel.fundamental?.rms ?? null,
    harmonics: channel.harmonics.map((harmonic) => ({
      order: harmonic.order,
      mean: mean(harmonic),
      smoothedMax: harmonic.smoothedMaxRms,
    })),
    highestMeasurableOrder: samplesPerCycle === null ? highestListed : Math.ceil(samplesPerCycle / 2) - 1,
  };
}
