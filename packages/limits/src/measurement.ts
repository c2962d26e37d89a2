import type { ChannelAnalysis, Harmonic, Quantity } from '@overtally/contracts';

/** When a lamp's current reaches 5 % of its peak, has its last peak, and falls below 5 %, in degrees. */
export interface CurrentShape {
  startsDeg: number;
  peakDeg: number;
  endsDeg: number;
}

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
    /** Expanded uncertainty (k = 2) of the mean, in the channel's unit; absent or null when not known. */
    uncertainty?: number | null;
    /** Smoothed values in equal steps over the observation, for the time above 150 % of a limit. */
    smoothed?: readonly number[] | Float64Array;
    /** Share of the observation, 0 to 1, with smoothed values above 150 % of the limit, where it is known. */
    timeAbove150Share?: number;
  }[];
  /** Length of the observation in s; absent or null when not known. */
  observationS?: number | null;
  /** Shape of the current in degrees after the zero crossing of the fundamental voltage; absent when not read. */
  currentShape?: CurrentShape | null;
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
  const { windows, fundamental } = channel;
  const samplesPerCycle = windows ? windows.samplesPerWindow / windows.cycles : null;
  return {
    quantity: channel.quantity,
    unit: channel.unit,
    rms: channel.rms,
    fundamentalRms: fundamental?.rms ?? null,
    harmonics: channel.harmonics.map((harmonic) => ({
      order: harmonic.order,
      mean: mean(harmonic),
      smoothedMax: harmonic.smoothedMaxRms,
      uncertainty: harmonic.uncertainty,
    })),
    highestMeasurableOrder: samplesPerCycle === null ? highestListed : Math.ceil(samplesPerCycle / 2) - 1,
    observationS: windows && fundamental ? (windows.count * windows.cycles) / fundamental.frequencyHz : null,
  };
}
