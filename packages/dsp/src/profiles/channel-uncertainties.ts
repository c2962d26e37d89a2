import type { MeasuredChannel } from '../stages/measure-channels.js';
import type { FundamentalResult, HarmonicResult, Uncertainty, WindowSeries } from '../types.js';
import { channelUncertainty, type ChannelUncertainty } from '../uncertainty/channel-uncertainty.js';
import { toneUncertainty } from '../uncertainty/tone-uncertainty.js';

/** The results that uncertainties are stated for. */
export interface StatedFigures {
  fundamental: FundamentalResult | null;
  harmonics: readonly HarmonicResult[];
  mean: number;
  series: WindowSeries | null;
  synchronisationErrorPercent: number | null;
}

/** Expanded uncertainties of the figures and orders of a channel. */
export function channelUncertainties(
  { survey: { context }, scan, grid, orders, tone }: MeasuredChannel,
  { fundamental, harmonics, mean, series, synchronisationErrorPercent }: StatedFigures,
): ChannelUncertainty {
  const { channel, sampleRateHz, sampleCount, settings } = context;
  const { rms, mean: sampleMean } = scan.figures;
  const acRms = Math.sqrt(Math.max(0, rms ** 2 - sampleMean ** 2));
  const plain = channelUncertainty({
    sampleRateHz,
    sampleCount,
    accuracy: settings.accuracy?.find((accuracy) => accuracy.channel === channel.index) ?? null,
    quantisationStep: scan.findings.quantisationStep,
    mean,
    rms,
    residualRms: orders === null ? acRms : orders.noiseRms * Math.sqrt(sampleCount),
    fundamental,
    lineRms: fundamental === null ? [] : harmonics.map((harmonic) => harmonic.rms),
    thdMaxOrder: settings.thdMaxOrder,
    windows: series && grid && { cycles: grid.cycles, synchronisationErrorPercent, series },
  });
  const ofTone: Record<string, Uncertainty> = tone === null ? {} : toneUncertainty(tone.powers);
  return { figures: { ...plain.figures, ...ofTone }, orders: plain.orders };
}
