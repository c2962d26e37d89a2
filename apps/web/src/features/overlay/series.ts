import type { ChannelSummary, Quantity, Recording } from '@overtally/contracts';
import type { OverlayEntry, OverlayView } from './overlay-link.js';

/** One channel of an overlay with its figures. */
export interface OverlaySeries {
  key: string;
  /** Index of its style. */
  style: number;
  recordingId: string;
  analysisId: string;
  /** Number of the recording, with the channel where the recording has several. */
  label: string;
  name: string;
  summary: ChannelSummary;
}

/** The channel an entry stands for: the one it names, else the first current, else the first one. */
export function channelOf(
  entry: OverlayEntry,
  recording: Pick<Recording, 'summaries'>,
): ChannelSummary | null {
  const { summaries } = recording;
  if (entry.channel !== null) return summaries.find(({ channel }) => channel === entry.channel) ?? null;
  return summaries.find(({ quantity }) => quantity === 'current') ?? summaries[0] ?? null;
}

/** Puts an entry and its recording together; null while there are no figures of the channel. */
export function seriesOf(entry: OverlayEntry, recording: Recording): OverlaySeries | null {
  const summary = channelOf(entry, recording);
  if (!summary || recording.latestAnalysisId === null) return null;
  const several = recording.summaries.length > 1;
  return {
    key: `${recording.id}:${summary.channel}`,
    style: entry.style,
    recordingId: recording.id,
    analysisId: recording.latestAnalysisId,
    label: several ? `${recording.number} ${summary.name}` : recording.number,
    name: recording.name,
    summary,
  };
}

const fundamentalOf = ({ harmonicRms }: ChannelSummary): number | null => {
  const rms = harmonicRms[0];
  return rms !== undefined && rms > 0 ? rms : null;
};

/**
 * What amplitudes are multiplied with: 1 for absolute ones, 100 % over the rms of order 1 for relative ones;
 * null when the channel has no fundamental to refer to.
 */
export function gainOf(summary: ChannelSummary, amplitude: OverlayView['amplitude']): number | null {
  if (amplitude === 'absolute') return 1;
  const fundamental = fundamentalOf(summary);
  return fundamental === null ? null : 100 / fundamental;
}

/** rms of an order in the channel's unit, or in percent of its own fundamental; null where there is none. */
export function valueAt(
  summary: ChannelSummary,
  order: number,
  amplitude: OverlayView['amplitude'],
): number | null {
  const rms = summary.harmonicRms[order - 1];
  const gain = gainOf(summary, amplitude);
  return rms === undefined || gain === null ? null : rms * gain;
}

/** Orders on the axis: as many as the longest channel has, odd ones or all. */
export function ordersShown(series: readonly OverlaySeries[], which: OverlayView['orders']): number[] {
  const last = Math.max(0, ...series.map(({ summary }) => summary.harmonicRms.length));
  const all = Array.from({ length: last }, (_, i) => i + 1);
  return which === 'all' ? all : all.filter((order) => order % 2 === 1);
}

/** Unit of the axis: `%` for relative amplitudes, else the one that all channels have. */
export function axisUnit(series: readonly OverlaySeries[], amplitude: OverlayView['amplitude']): string {
  return amplitude === 'relative' ? '%' : (series[0]?.summary.unit ?? '');
}

/** Quantity of all channels; null when they differ. */
export function commonQuantity(series: readonly OverlaySeries[]): Quantity | null {
  const quantities = new Set(series.map(({ summary }) => summary.quantity));
  return quantities.size === 1 ? (series[0]?.summary.quantity ?? null) : null;
}

const unitWords: Readonly<Record<string, string>> = {
  A: 'amperes',
  mA: 'milliamperes',
  V: 'volts',
  mV: 'millivolts',
  W: 'watts',
  Pa: 'pascals',
};
const named = (unit: string) => unitWords[unit] ?? (unit === '' ? 'values without a unit' : unit);

/** Why the channels cannot stand on one axis; null when they can. */
export function mixedUnits(
  series: readonly OverlaySeries[],
  amplitude: OverlayView['amplitude'],
): string | null {
  if (amplitude === 'relative') return null;
  const units = [...new Set(series.map(({ summary }) => summary.unit))].map(named);
  if (units.length < 2) return null;
  const words = `${units.slice(0, -1).join(', ')} and ${units.at(-1)}`;
  return `${words.charAt(0).toUpperCase()}${words.slice(1)} can’t share an axis; switch to relative`;
}
