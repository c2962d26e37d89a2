import { seriesFigures, type SeriesFigures } from '../fourier/series-figures.js';
import { checkSeries } from '../fourier/check-series.js';
import type { FourierSeries } from '../fourier/types.js';
import { waveformOf } from '../fourier/waveform.js';
import type { StageChain } from '../transfer/frequency-response.js';
import type { StabilityVerdict } from '../transfer/transfer-function.js';
import { steadyStateOf } from '../transfer/steady-state.js';

export interface ThroughStagesOptions {
  /** Last order that counts for THD, default the highest one of the input. */
  maxOrder?: number;
  /** Points of one cycle of the waveforms, default 1000. */
  pointsPerCycle?: number;
  /** Cycles drawn, default 2. */
  cycles?: number;
}

/** One order at the input and at the output. */
export interface OrderThroughStages {
  order: number;
  frequencyHz: number;
  inputRms: number;
  outputRms: number;
  inputPhaseDeg: number | null;
  outputPhaseDeg: number | null;
  /** abs(H) at the order; null where the input holds nothing of it. */
  gain: number | null;
}

export interface StagesResult {
  isDefined: true;
  input: SeriesFigures;
  output: SeriesFigures;
  series: FourierSeries;
  orders: OrderThroughStages[];
  waveform: { timeS: Float64Array; input: Float64Array; output: Float64Array };
}

const POINTS_PER_CYCLE = 1000;

/**
 * Harmonics through stages in series: the periodic steady state, order by order, with the figures and waveforms of input
 * and output. Phases in cosine form, t = 0 at the start of a cycle.
 *
 * @returns why there is no steady state, when a stage is not stable
 * @throws AnalysisInputError for a frequency that is not positive or orders that are no positive whole numbers, each once
 */
export function harmonicsThroughStages(
  input: FourierSeries,
  chain: StageChain,
  options: ThroughStagesOptions = {},
): StagesResult | { isDefined: false; verdict: StabilityVerdict; reason: string } {
  checkSeries(input);
  const state = steadyStateOf(input, chain);
  if (!state.isDefined) return state;
  const highest = input.components.reduce((max, { order }) => Math.max(max, order), 1);
  const { maxOrder = highest, pointsPerCycle = POINTS_PER_CYCLE, cycles = 2 } = options;
  const before = waveformOf(input, { pointsPerCycle, cycles });
  return {
    isDefined: true,
    input: seriesFigures(input, maxOrder),
    output: seriesFigures(state.series, maxOrder),
    series: state.series,
    orders: input.components.map(({ order, rms, phaseDeg }, i) => {
      const behind = state.series.components[i]!;
      return {
        order,
        frequencyHz: order * input.frequencyHz,
        inputRms: rms,
        outputRms: behind.rms,
        inputPhaseDeg: phaseDeg,
        outputPhaseDeg: behind.phaseDeg,
        gain: rms > 0 ? behind.rms / rms : null,
      };
    }),
    waveform: {
      timeS: before.timeS,
      input: before.values,
      output: waveformOf(state.series, { pointsPerCycle, cycles }).values,
    },
  };
}
