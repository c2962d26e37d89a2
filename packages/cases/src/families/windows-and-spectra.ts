import { welch, windowFigures, windowSamples, type WindowName } from '@overtally/dsp';
import { z } from 'zod';
import { recordOf } from '../analyse-case.js';
import { CannotServe, type Mapper, type Quantities } from '../quantities.js';

/** How many lines or samples the definitions list. */
const listedLines = 16;
const listedLastLines = 3;
const listedSamples = 4;

const windowNames: Record<string, WindowName> = {
  rectangular: 'rectangular',
  boxcar: 'rectangular',
  hann: 'hann',
  hamming: 'hamming',
  blackman: 'blackman',
  blackmanharris: 'blackman-harris',
  nuttall: 'nuttall',
  flattop: 'flat-top',
  kaiser: 'kaiser',
};

const windowInput = z.object({
  window: z.string(),
  beta: z.number().nullish(),
  N: z.number().int().positive(),
});

const welchSettings = z.object({
  window: z.string(),
  beta: z.number().nullish(),
  nperseg: z.number().int().positive(),
  noverlap: z.number().int().min(0),
});

/** Family 7: figures of merit of a window, or the averaged spectrum of a record. */
export const windowsAndSpectra: Mapper = (folder, one) =>
  one.input === null ? spectrumOf(folder, one) : windowQuantities(windowInput.parse(one.input));

function windowQuantities({ window, beta, N }: z.infer<typeof windowInput>): Quantities {
  const samples = windowSamples(windowNamed(window), N, beta ?? undefined);
  const figures = windowFigures(samples);
  return {
    coherent_gain: figures.coherentGain,
    enbw_bins: figures.enbwBins,
    scallop_loss_db: figures.scallopLossDb,
    highest_sidelobe_db: figures.highestSidelobeDb,
    first_samples: [...samples.subarray(0, listedSamples)],
    middle_sample: samples[N >> 1],
  };
}

const spectrumOf: Mapper = async (folder, one) => {
  const { window, beta, nperseg, noverlap } = welchSettings.parse(one.analysis);
  const { channels, sampleRateHz } = await recordOf(folder, one);
  const options = {
    window: windowNamed(window),
    kaiserBeta: beta ?? undefined,
    segmentLength: nperseg,
    overlapSamples: noverlap,
    detrend: 'mean',
  } as const;
  const { samples } = channels[0]!;
  const density = welch(samples, sampleRateHz, { ...options, scaling: 'density' });
  const spectrum = welch(samples, sampleRateHz, { ...options, scaling: 'spectrum' });
  const sum = density.power.reduce((total, power) => total + power, 0);
  return {
    frequencies_hz: Array.from({ length: listedLines }, (_, k) => k * density.stepHz),
    psd: [...density.power.subarray(0, listedLines)],
    psd_last: [...density.power.subarray(-listedLastLines)],
    power_spectrum: [...spectrum.power.subarray(0, listedLines)],
    segments: density.segments,
    psd_sum_times_df: sum * density.stepHz,
  };
};

/** The first word names the window; "(periodic)" may follow, which all windows here are. */
function windowNamed(words: string): WindowName {
  const name = windowNames[words.split(/[\s(]/)[0]!.toLowerCase().replaceAll(/[-_]/g, '')];
  if (name === undefined) throw new CannotServe(`there is no window "${words}"`);
  return name;
}
