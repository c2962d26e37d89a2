import { describe, expect, it } from 'vitest';
import { welch, windowFigures, windowSamples, type WindowName } from '../src/index.js';
import { judge } from './judge.js';
import { readRecord, referenceCases, type ReferenceCase } from './reference-cases.js';

/** The names of the reference cases and ours. */
const NAMES: Record<string, WindowName> = {
  rectangular: 'rectangular',
  hann: 'hann',
  hamming: 'hamming',
  blackman: 'blackman',
  blackmanharris: 'blackman-harris',
  nuttall: 'nuttall',
  flattop: 'flat-top',
  kaiser: 'kaiser',
};

describe.each(referenceCases(7))('$id $title', (reference) => {
  const results = reference.files.length > 0 ? spectrumResults(reference) : windowResults(reference);

  it.each(Object.keys(reference.expected))('%s', (quantity) => {
    expect(judge(reference.expected[quantity]!, results[quantity])).toBeNull();
  });
});

function windowResults({ generator }: ReferenceCase): Record<string, unknown> {
  const { window, N, beta } = generator as { window: string; N: number; beta: number | null };
  const samples = windowSamples(NAMES[window]!, N, beta ?? undefined);
  const figures = windowFigures(samples);
  return {
    coherent_gain: figures.coherentGain,
    enbw_bins: figures.enbwBins,
    scallop_loss_db: figures.scallopLossDb,
    highest_sidelobe_db: figures.highestSidelobeDb,
    first_samples: [...samples.slice(0, 4)],
    middle_sample: samples[N / 2],
  };
}

function spectrumResults(reference: ReferenceCase): Record<string, unknown> {
  const { window, nperseg, noverlap } = reference.analysis as {
    window: string;
    nperseg: number;
    noverlap: number;
  };
  const { samples, sampleRateHz } = readRecord(reference);
  const options = {
    window: NAMES[window.split(' ')[0]!]!,
    segmentLength: nperseg,
    overlapSamples: noverlap,
    detrend: 'mean',
  } as const;
  const density = welch(samples, sampleRateHz, { ...options, scaling: 'density' });
  const spectrum = welch(samples, sampleRateHz, { ...options, scaling: 'spectrum' });
  return {
    frequencies_hz: Array.from({ length: 16 }, (_, k) => k * density.stepHz),
    psd: [...density.power.slice(0, 16)],
    psd_last: [...density.power.slice(-3)],
    power_spectrum: [...spectrum.power.slice(0, 16)],
    segments: density.segments,
    psd_sum_times_df: density.power.reduce((sum, p) => sum + p, 0) * density.stepHz,
  };
}
