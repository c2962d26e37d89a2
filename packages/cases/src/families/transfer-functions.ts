import {
  dcGain,
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
} from '@overtally/dsp';
import { z } from 'zod';
import { CannotServe, type Mapper, type Quantities } from '../quantities.js';

const coefficients = z.array(z.number()).min(1);

const stageInput = z.object({ num: coefficients, den: coefficients });
const waveInput = z.object({
  wave: z.enum(['square', 'pulse']),
  high: z.number(),
  low: z.number(),
  duty: z.number(),
  frequency_hz: z.number().positive(),
});
const seriesInput = z.object({
  f0_hz: z.number().positive(),
  input_rms: z.array(z.number()),
  input_phase_deg: z.array(z.number().nullable()),
});
const settings = z.object({
  frequencies_hz: z.array(z.number()).optional(),
  orders: z.number().int().positive().optional(),
});

const waveOrders = 50;
const waveformPoints = 16;

/** Family 8: response, stability and periodic steady state of a transfer function. */
export const transferFunctions: Mapper = (_folder, { input, analysis }) => {
  if (input === null) throw new CannotServe('the case states no transfer function');
  const { num, den } = stageInput.parse(input);
  const h = transferFunction(num, den);
  const { frequencies_hz: frequencies, orders } = settings.parse(analysis);
  const series = seriesInput.safeParse(input);
  if (series.success) return seriesThrough(h, series.data);
  const wave = waveInput.safeParse(input.input);
  if (wave.success) return waveThrough(h, wave.data, orders ?? waveOrders);
  return stageQuantities(h, frequencies ?? []);
};

function stageQuantities(h: TransferFunction, frequenciesHz: number[]): Quantities {
  const { verdict } = stability(h);
  const response = frequencyResponse(h, frequenciesHz);
  const gain = dcGain(h);
  return {
    magnitude: response.map(({ magnitude }) => magnitude),
    magnitude_db: response.map(({ magnitudeDb }) => magnitudeDb),
    phase_deg: response.map(({ phaseDeg }) => phaseDeg),
    poles: poles(h).flatMap(({ re, im, multiplicity }) =>
      Array.from({ length: multiplicity }, () => [re, im]),
    ),
    stability: verdict,
    steady_state_defined: verdict === 'stable',
    ...(gain !== null && { dc_gain: gain }),
  };
}

function waveThrough(
  h: TransferFunction,
  { frequency_hz: frequencyHz, high, low, duty }: z.infer<typeof waveInput>,
  orders: number,
): Quantities {
  const wave = { high, low, duty, frequencyHz };
  const output = steadyStateOf(twoLevelSeries(wave, orders), h);
  if (!output.isDefined) return { steady_state_defined: false, message: output.reason };
  const rms = output.series.components.map((component) => component.rms);
  return {
    steady_state_defined: true,
    output_harmonic_rms: rms,
    output_phase_deg: output.series.components.map(({ phaseDeg }) => phaseDeg),
    [`output_thd_f_${orders}`]: thdF(rms, orders),
    ...closedForm(h, wave),
  };
}

/** Levels and waveform behind a low-pass of first order with gain 1, which alone has the closed form. */
function closedForm(
  { numerator, denominator }: TransferFunction,
  wave: Parameters<typeof twoLevelSteadyState>[0],
): Quantities {
  const [gain = 0] = numerator;
  const [slope = 0, constant = 0] = denominator;
  const isLowPass = numerator.length === 1 && denominator.length === 2 && constant === gain;
  if (!isLowPass) return {};
  const state = twoLevelSteadyState(wave, slope / constant);
  const { peak, minimum, mean, rms } = state;
  return { peak, minimum, mean, rms, waveform_16: [...state.waveform(waveformPoints)] };
}

function seriesThrough(h: TransferFunction, input: z.infer<typeof seriesInput>): Quantities {
  const components = input.input_rms.map((rms, i) => ({
    order: i + 1,
    rms,
    phaseDeg: input.input_phase_deg[i] ?? null,
  }));
  const series: FourierSeries = { frequencyHz: input.f0_hz, dc: 0, components };
  const output = steadyStateOf(series, h);
  if (!output.isDefined) return { steady_state_defined: false, message: output.reason };
  const rms = output.series.components.map((component) => component.rms);
  return {
    output_rms: rms,
    output_phase_deg: output.series.components.map(({ phaseDeg }) => phaseDeg),
    input_thd_f: thdF(input.input_rms, input.input_rms.length),
    output_thd_f: thdF(rms, rms.length),
    output_total_rms: Math.hypot(...rms),
  };
}
