import type { Aggregation, ChannelAnalysis, SeriesFigure, Statistics } from '@overtally/contracts';
import { formatHz } from '../../../../lib/format.js';

/** A figure that can be followed: those of the windows, and the frequency counted over 10 s. */
export type FollowedFigure = SeriesFigure | 'counted';

/** What is followed over time. */
export interface SeriesChoice {
  figure: FollowedFigure;
  /** Order; lower order of interharmonics; number of the band from 0. */
  order: number;
  aggregation: Aggregation;
}

interface FigureOption {
  value: FollowedFigure;
  label: string;
}

const figureWords: Record<FollowedFigure, string> = {
  rms: 'rms',
  frequency: 'Frequency',
  counted: 'Frequency, counted over 10 s',
  thd: 'THD, single lines',
  thdg: 'THDG, groups',
  thds: 'THDS, subgroups',
  pwhd: 'PWHD, weighted',
  line: 'Order, single line',
  group: 'Order, group',
  subgroup: 'Order, subgroup',
  interharmonicGroup: 'Interharmonic group',
  centredSubgroup: 'Interharmonic centred subgroup',
  band: '200 Hz band',
};

/** Figures that the windows of this channel hold. */
export function figureOptions(channel: ChannelAnalysis): FigureOption[] {
  const { harmonics, interharmonics, distortion, bands, countedFrequency } = channel;
  const holds: Record<FollowedFigure, boolean> = {
    rms: true,
    frequency: true,
    counted: countedFrequency.length > 0,
    thd: distortion !== null,
    thdg: Boolean(distortion?.thdg),
    thds: Boolean(distortion?.thds),
    pwhd: Boolean(distortion?.pwhd),
    line: harmonics.length > 0,
    group: harmonics.some(({ groupRms }) => groupRms !== null),
    subgroup: harmonics.some(({ subgroupRms }) => subgroupRms !== null),
    interharmonicGroup: interharmonics.length > 0,
    centredSubgroup: interharmonics.length > 0,
    band: bands.length > 0,
  };
  return (Object.keys(figureWords) as FollowedFigure[])
    .filter((figure) => holds[figure])
    .map((value) => ({ value, label: figureWords[value] }));
}

/** Choices of the order, the pair of orders or the band; empty for a figure without one. */
export function orderOptions(
  figure: FollowedFigure,
  channel: ChannelAnalysis,
): { value: number; label: string }[] {
  switch (figure) {
    case 'line':
    case 'group':
    case 'subgroup':
      return channel.harmonics.map(({ order }) => ({ value: order, label: String(order) }));
    case 'interharmonicGroup':
    case 'centredSubgroup':
      return channel.interharmonics.map(({ betweenOrders: [below, above] }) => ({
        value: below,
        label: `${below} and ${above}`,
      }));
    case 'band':
      return channel.bands.map(({ centreHz }, index) => ({
        value: index,
        label: `around ${formatHz(centreHz, 0)}`,
      }));
    case 'rms':
    case 'frequency':
    case 'counted':
    case 'thd':
    case 'thdg':
    case 'thds':
    case 'pwhd':
      return [];
  }
}

/** Label of the second choice. */
export function orderLabel(figure: FollowedFigure): string {
  if (figure === 'band') return 'Band';
  return figure === 'interharmonicGroup' || figure === 'centredSubgroup' ? 'Between orders' : 'Order';
}

/** The choice for an order: its group for a current, its subgroup for anything else (what limits are applied to). */
export function followOrder(channel: ChannelAnalysis, order: number, before: SeriesChoice): SeriesChoice {
  const isOfOrder = before.figure === 'line' || before.figure === 'group' || before.figure === 'subgroup';
  const own = channel.quantity === 'current' ? 'group' : 'subgroup';
  return { ...before, figure: isOfOrder ? before.figure : own, order };
}

/** A choice that the channel holds: the figure or order falls back to the first where it does not. */
export function fitted(choice: SeriesChoice, channel: ChannelAnalysis): SeriesChoice {
  const figure = figureOptions(channel).some(({ value }) => value === choice.figure) ? choice.figure : 'rms';
  const orders = orderOptions(figure, channel);
  const order = orders.some(({ value }) => value === choice.order) ? choice.order : (orders[0]?.value ?? 1);
  return { ...choice, figure, order };
}

/** What is followed, within a title: "order 5, group", "THD, single lines". */
export function choiceTitle({ figure, order }: SeriesChoice, channel: ChannelAnalysis): string {
  const word = figureWords[figure];
  switch (figure) {
    case 'line':
    case 'group':
    case 'subgroup':
      return `order ${order}, ${figure === 'line' ? 'single line' : figure}`;
    case 'interharmonicGroup':
    case 'centredSubgroup':
      return `${word.toLowerCase()} between orders ${order} and ${order + 1}`;
    case 'band':
      return `band around ${formatHz(channel.bands[order]?.centreHz ?? null, 0)}`;
    case 'frequency':
    case 'counted':
      return word.toLowerCase();
    case 'rms':
    case 'thd':
    case 'thdg':
    case 'thds':
    case 'pwhd':
      return word;
  }
}

/** Statistics over the windows of what is followed; null where the analysis has none of it. */
export function statisticsOf({ figure, order }: SeriesChoice, channel: ChannelAnalysis): Statistics | null {
  const { distortion, harmonics } = channel;
  const harmonic = harmonics.find((candidate) => candidate.order === order);
  switch (figure) {
    case 'thd':
    case 'thdg':
    case 'thds':
    case 'pwhd':
      return distortion?.[figure] ?? null;
    case 'group':
      return harmonic?.groupStatistics ?? null;
    case 'subgroup':
      return harmonic?.subgroupStatistics ?? null;
    case 'rms':
    case 'frequency':
    case 'counted':
    case 'line':
    case 'interharmonicGroup':
    case 'centredSubgroup':
    case 'band':
      return null;
  }
}
