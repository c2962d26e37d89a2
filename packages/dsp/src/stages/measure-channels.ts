import { joinChunks, type WindowChunk } from '../parts/window-chunk.js';
import { combineToneFigures } from '../tone/tone-figures.js';
import { toneOptions } from '../parts/tone-options.js';
import type { ToneResult } from '../tone/tone-result.js';
import type { ChannelSurvey } from './channel-survey.js';
import { observeChannel, type Observation } from './observe-channel.js';
import { fittedOrders, ordersOfPhasors, windowOrders, type OrderSet } from './order-set.js';
import { PartBatch, type Batches } from './part-batch.js';
import { splitItems } from './split.js';
import { toneStretches } from './tone-stretches.js';
import { windowFrequencyHz } from './window-frequency.js';
import { windowCount, type WindowGrid } from './window-grid.js';

/** A channel with the windows it is taken in. */
export interface GriddedChannel {
  survey: ChannelSurvey;
  /** null when the channel has no fundamental and follows none. */
  grid: WindowGrid | null;
}

export interface MeasuredChannel extends GriddedChannel, Observation {
  /** Of the channel's own fundamental over the whole record; null when it has none. */
  frequencyHz: number | null;
  /** null when no whole window fits, or windows are not asked for. */
  windows: WindowChunk | null;
  orders: OrderSet | null;
  tone: ToneResult | null;
}

/**
 * Everything that takes the samples of the channels with their windows laid. All of it goes into one batch, the passes
 * over whole channels first, so that threads have no need to wait for one another.
 *
 * @param channels a channel may be given twice, in different windows
 */
export function* measureChannels(channels: readonly GriddedChannel[]): Batches<MeasuredChannel[]> {
  const batch = new PartBatch();
  const surveys = new Set(channels.map(({ survey }) => survey));
  const observed = new Map([...surveys].map((survey) => [survey, observeChannel(survey, batch)]));
  const tones = new Map([...surveys].map((survey) => [survey, toneParts(survey, batch)]));
  const pending = channels.map((channel) => ({
    windows: windowParts(channel, batch),
    fit: fitPart(channel, batch),
  }));
  yield* batch.run();
  const windows = pending.map((each) => each.windows?.() ?? null);
  const frequencies = channels.map((channel, i) => ownFrequency(channel, windows[i]!));
  return channels.map((channel, i) => {
    const { survey, grid } = channel;
    const setter = channels.findIndex((other) => isSetter(other) && other.grid === grid);
    const reference = { windows: windows[setter] ?? null, frequencyHz: frequencies[setter] ?? null };
    const observation = observed.get(survey)!();
    const totalRms = observation.scan.figures.rms;
    return {
      ...channel,
      ...observation,
      frequencyHz: frequencies[i]!,
      windows: windows[i]!,
      orders: pending[i]!.fit?.() ?? ordersWithoutFit(channel, windows[i]!, reference, totalRms),
      tone: tones.get(survey)?.() ?? null,
    };
  });
}

/** The fit of the whole record gives it, of a long record the windows. */
function ownFrequency({ survey, grid }: GriddedChannel, windows: WindowChunk | null): number | null {
  const { context, fundamental } = survey;
  if (fundamental === null || windows === null || !grid?.ordersFromWindows) {
    return fundamental?.frequencyHz ?? null;
  }
  return windowFrequencyHz(windows, grid, context.sampleRateHz) ?? fundamental.frequencyHz;
}

/** Whether the fundamental of the channel itself sets its windows. */
function isSetter({ survey, grid }: GriddedChannel): boolean {
  return grid !== null && grid.channel === survey.context.channel.index;
}

function windowParts(
  { survey: { context }, grid }: GriddedChannel,
  batch: PartBatch,
): (() => WindowChunk) | null {
  if (grid === null || windowCount(grid) === 0) return null;
  if (context.settings.profile !== 'mains' && !grid.ordersFromWindows) return null;
  const { boundaries, cycles, orders, bandCentresHz } = grid;
  const samplesPerWindow = boundaries[windowCount(grid)]! / windowCount(grid);
  const chunks = splitItems(windowCount(grid), samplesPerWindow).map(({ from, to }) => {
    const plan = { boundaries: boundaries.slice(from, to + 1), cycles, orders, bandCentresHz };
    return batch.addLarge({ ...context, kind: 'windows', plan });
  });
  function* inOrder() {
    for (const chunk of chunks) yield chunk();
  }
  return () => joinChunks(inOrder(), { count: windowCount(grid), orders, bands: bandCentresHz.length });
}

/** Orders at a fundamental that another channel set, or of a long record that holds no whole window. */
function fitPart(channel: GriddedChannel, batch: PartBatch): (() => OrderSet) | null {
  const { survey, grid } = channel;
  if (grid === null) return null;
  const wanted = grid.ordersFromWindows ? windowCount(grid) === 0 : !isSetter(channel);
  if (!wanted) return null;
  const phasors = batch.add({ ...survey.context, kind: 'orders', fundamentalHz: grid.frequencyHz });
  return () => ordersOfPhasors(phasors(), grid.frequencyHz);
}

/** @param reference what the channel that sets the windows gave */
function ordersWithoutFit(
  { survey: { context, fundamental }, grid }: GriddedChannel,
  windows: WindowChunk | null,
  reference: { windows: WindowChunk | null; frequencyHz: number | null },
  totalRms: number,
): OrderSet | null {
  if (grid === null) return null;
  const { sampleCount, sampleRateHz } = context;
  if (!grid.ordersFromWindows) return fittedOrders(fundamental!.estimate, sampleCount);
  return windowOrders(windows!, reference.windows!, grid, {
    frequencyHz: reference.frequencyHz!,
    totalRms,
    sampleCount,
    sampleRateHz,
  });
}

function toneParts(
  { context, fundamental, track }: ChannelSurvey,
  batch: PartBatch,
): (() => ToneResult) | null {
  if (context.settings.profile !== 'tone' || fundamental === null) return null;
  const stretches = toneStretches({ context, fundamental, track }).map(({ stretch, fundamentalHz }) =>
    batch.add({ ...context, kind: 'tone', fundamentalHz, stretch }),
  );
  return () =>
    combineToneFigures(
      stretches.map((result) => result()),
      toneOptions(context),
    );
}
