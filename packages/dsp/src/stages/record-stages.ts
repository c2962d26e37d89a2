import { recordPower } from '../power/record-power.js';
import { channelAnalysis } from '../profiles/channel-analysis.js';
import { checkRecord } from '../profiles/check-input.js';
import { powerSets } from '../profiles/power-sets.js';
import { resolveSettings } from '../profiles/resolve-settings.js';
import type { RecordAnalysis, RecordSource } from '../types.js';
import { surveyChannels, type ChannelSurvey } from './channel-survey.js';
import { measureChannels, type GriddedChannel, type MeasuredChannel } from './measure-channels.js';
import type { Batches } from './part-batch.js';
import { followsGrid, gridChannel } from './record-grid.js';
import { createWindowGrid, type WindowGrid } from './window-grid.js';

/** Version of the engine; stored with every analysis. Changes whenever a figure could change. */
export const engineVersion = '0.2.0';

/**
 * The analysis of a record as batches of parts: survey of each channel; then, with all fundamentals known, windows, orders
 * and tone figures; then the results.
 *
 * @throws AnalysisInputError for input that cannot be analysed
 */
export function* recordStages(source: RecordSource): Batches<RecordAnalysis> {
  checkRecord(source);
  const settings = resolveSettings(source.settings, source.channels);
  const { sampleRateHz, sampleCount } = source;
  const surveys = yield* surveyChannels(
    source.channels.map((channel) => ({ channel, sampleRateHz, sampleCount, settings })),
  );
  const sets = powerSets(settings, source.channels);
  const { channels, forPower, grid } = layWindows(surveys, sets.channels);
  const measured = yield* measureChannels([...channels, ...forPower]);
  const powerChannels = measured.filter((channel) => channel.grid === grid).flatMap(powerChannel);
  const [first] = powerChannels;
  return {
    engineVersion,
    settings,
    channels: measured
      .slice(0, channels.length)
      .map((channel) => channelAnalysis(channel, source.gapsBefore ?? [])),
    ...(first === undefined || sets.channels.size === 0
      ? { power: [], threePhase: [] }
      : recordPower({
          frequencyHz: first.phasors.frequencyHz,
          channels: powerChannels,
          pairs: sets.pairs,
          threePhase: sets.threePhase,
          ratedCurrentA: settings.ratedCurrentA,
        })),
  };
}

interface LaidWindows {
  channels: GriddedChannel[];
  /** Channels with windows of their own that a power needs in those of the record as well. */
  forPower: GriddedChannel[];
  grid: WindowGrid | null;
}

/**
 * Windows for each channel: mains and general take those of the record where they can (`followsGrid`), tone takes each
 * channel for itself. A channel without a fundamental gets windows in the mains profile, or for a power.
 */
function layWindows(surveys: readonly ChannelSurvey[], inPower: ReadonlySet<number>): LaidWindows {
  const setter = surveys[0]?.context.settings.profile === 'tone' ? null : gridChannel(surveys);
  const gridOf = (survey: ChannelSurvey): WindowGrid => {
    const { channel, sampleRateHz, sampleCount, settings } = survey.context;
    const ordersFromWindows = !survey.fittedWhole;
    const record = { sampleRateHz, sampleCount, channelCount: surveys.length, ordersFromWindows, settings };
    return createWindowGrid(channel.index, survey.fundamental!.frequencyHz, survey.track, record);
  };
  const grid = setter && gridOf(setter);
  const needed = ({ context: { channel, settings }, fundamental }: ChannelSurvey) =>
    fundamental !== null || settings.profile === 'mains' || inPower.has(channel.index);
  const channels = surveys.map((survey): GriddedChannel => {
    if (setter && followsGrid(survey, setter)) return { survey, grid: needed(survey) ? grid : null };
    return { survey, grid: survey.fundamental && gridOf(survey) };
  });
  const forPower = channels
    .filter(({ survey, grid: own }) => grid && own !== grid && inPower.has(survey.context.channel.index))
    .map(({ survey }) => ({ survey, grid }));
  return { channels, forPower, grid };
}

function powerChannel({ survey, orders }: MeasuredChannel) {
  const { index, name, unit } = survey.context.channel;
  return orders === null ? [] : [{ index, name, unit, phasors: orders }];
}
