import { AnalysisInputError } from '../errors.js';
import { unitFactor } from '../power/unit-factor.js';
import type { AnalysisSettings, ChannelDescription } from '../types.js';

/**
 * Refuses settings that name a channel which is not there or does not measure what is asked of it.
 *
 * @throws AnalysisInputError
 */
export function checkChannelSettings(
  { pairs = [], threePhase = [], accuracy = [], ratedCurrentA }: AnalysisSettings,
  channels: readonly ChannelDescription[],
): void {
  for (const { voltage, current } of pairs) {
    requireQuantity(channels, voltage, 'voltage', 'V');
    requireQuantity(channels, current, 'current', 'A');
  }
  for (const { voltages, currents } of threePhase) {
    requireDifferent('voltages', voltages);
    requireDifferent('currents', currents);
    for (const index of voltages) requireQuantity(channels, index, 'voltage', 'V');
    for (const index of currents) requireQuantity(channels, index, 'current', 'A');
  }
  for (const { channel, readingPercent, calibrationPercent } of accuracy) {
    const { name } = channelAt(channels, channel);
    requireShare(`limits of error of channel '${name}'`, readingPercent);
    requireShare(`uncertainty of the calibration of channel '${name}'`, calibrationPercent);
  }
  requireDifferentAccuracies(accuracy.map(({ channel }) => channel));
  if (ratedCurrentA !== undefined && !(ratedCurrentA > 0 && ratedCurrentA < Infinity)) {
    throw new AnalysisInputError(
      `The rated current must be a positive number of amperes, got ${ratedCurrentA}.`,
    );
  }
}

function channelAt(channels: readonly ChannelDescription[], index: number): ChannelDescription {
  const channel = channels.find((each) => each.index === index);
  if (!channel)
    throw new AnalysisInputError(`The settings name channel ${index}, which the record does not have.`);
  return channel;
}

function requireQuantity(
  channels: readonly ChannelDescription[],
  index: number,
  quantity: 'voltage' | 'current',
  base: 'V' | 'A',
): void {
  const channel = channelAt(channels, index);
  if (channel.quantity !== quantity) {
    throw new AnalysisInputError(
      `Channel '${channel.name}' measures ${channel.quantity}; the settings take it for a ${quantity}.`,
    );
  }
  if (unitFactor(channel.unit, base) === null) {
    throw new AnalysisInputError(
      `Channel '${channel.name}' has the unit '${channel.unit}'; a power needs ${base} or a multiple of it.`,
    );
  }
}

function requireDifferent(what: string, indices: readonly number[]): void {
  if (new Set(indices).size === indices.length) return;
  throw new AnalysisInputError(
    `The ${what} of three phases must be three different channels, got ${indices.join(', ')}.`,
  );
}

function requireDifferentAccuracies(indices: readonly number[]): void {
  const twice = indices.find((index, i) => indices.indexOf(index) !== i);
  if (twice === undefined) return;
  throw new AnalysisInputError(`The accuracy of channel ${twice} is given twice.`);
}

function requireShare(what: string, percent: number): void {
  if (percent >= 0 && percent <= 100) return;
  throw new AnalysisInputError(`The ${what} must lie between 0 % and 100 %, got ${percent}.`);
}
