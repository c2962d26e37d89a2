import { describe, expect, it } from 'vitest';
import {
  dcGain,
  expandRoots,
  frequencyResponse,
  poles,
  stability,
  steadyStateOf,
  thdF,
  transferFunction,
  twoLevelSeries,
  twoLevelSteadyState,
  type FourierSeries,
  type TransferFunction,
} from '../src/index.js';
import { judge } from './judge.js';
import { referenceCases, type ReferenceCase } from './reference-cases.js';

interface Generator {
  num: number[];
  den: number[];
  /** Two-level cases. */
  input?: { high: number; low: number; duty: number; frequency_hz: number };
  tau_s?: number;
  /** Cases of a harmonic series. */
  f0_hz?: number;
  input_rms?: number[];
  input_phase_deg?: number[];
}

describe.each(referenceCases(8))('$id $title', (reference) => {
  const results = measure(reference);

  it.each(Object.keys(reference.expected))('%s', (quantity) => {
    expect(judge(reference.expected[quantity]!, results[quantity])).toBeNull();
  });
});

function measure({ analysis, generator }: ReferenceCase): Record<string, unknown> {
  const { num, den, input, tau_s, f0_hz, input_rms, input_phase_deg } = generator as unknown as Generator;
  const h = transferFunction(num, den);
  if (input && tau_s) {
    const wave = { ...input, frequencyHz: input.frequency_hz };
    const { peak, minimum, mean, rms, waveform } = twoLevelSteadyState(wave, tau_s);
    return {
      ...{ peak, minimum, mean, rms },
      waveform_16: [...waveform(16)],
      ...outputs(twoLevelSeries(wave, analysis.orders as number), h),
    };
  }
  if (input_rms && input_phase_deg) {
    const components = input_rms.map((rms, i) => ({ order: i + 1, rms, phaseDeg: input_phase_deg[i]! }));
    return outputs({ frequencyHz: f0_hz!, dc: 0, components }, h);
  }
  if (input) return outputs(twoLevelSeries({ ...input, frequencyHz: input.frequency_hz }, 50), h);
  const response = frequencyResponse(h, analysis.frequencies_hz as number[]);
  return {
    magnitude: response.map((point) => point.magnitude),
    magnitude_db: response.map((point) => point.magnitudeDb),
    phase_deg: response.map((point) => point.phaseDeg),
    dc_gain: dcGain(h),
    poles: expandRoots(poles(h)).map(({ re, im }) => [re, im]),
    stability: stability(h).verdict,
    steady_state_defined: steadyStateOf({ frequencyHz: 50, dc: 0, components: [] }, h).isDefined,
  };
}

function outputs(series: FourierSeries, h: TransferFunction): Record<string, unknown> {
  const state = steadyStateOf(series, h);
  if (!state.isDefined) return { steady_state_defined: false, message: state.reason };
  const input = series.components.map((c) => c.rms);
  const output = state.series.components.map((c) => c.rms);
  const phases = state.series.components.map((c) => c.phaseDeg);
  return {
    output_rms: output,
    output_harmonic_rms: output,
    output_phase_deg: phases,
    output_total_rms: Math.hypot(...output),
    input_thd_f: thdF(input, 25),
    output_thd_f: thdF(output, 25),
    output_thd_f_50: thdF(output, 50),
  };
}
