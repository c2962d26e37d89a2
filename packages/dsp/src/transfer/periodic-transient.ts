import { AnalysisInputError } from '../errors.js';
import { checkSeries } from '../fourier/check-series.js';
import type { FourierSeries } from '../fourier/types.js';
import { seriesFigures } from '../fourier/series-figures.js';
import { seriesValue } from '../fourier/series-value.js';
import { undrawnOrders } from '../fourier/waveform.js';
import { complexAdd, complexDivide, fromPolar, type Complex } from '../linear/complex.js';
import { chainPoles } from './chain-poles.js';
import { inSeries } from './compose.js';
import {
  exponentialTerms,
  lastTimeOutside,
  roundingOf,
  sumAt,
  type ExponentialTerm,
} from './exponential-sum.js';
import type { StageChain } from './frequency-response.js';
import { residuesAt } from './partial-fractions.js';
import { steadyStateOf } from './steady-state.js';
import type { StabilityVerdict } from './transfer-function.js';

/** How a periodic input that sets in at t = 0 settles behind stages at rest. */
export interface PeriodicTransient {
  isDefined: true;
  /** The steady state, as if the input had always been there. */
  series: FourierSeries;
  /** What stands in front of it, dying away; times count from the delay of the stages. */
  terms: ExponentialTerm[];
  delayS: number;
  /** Output at a time in seconds: steady state and transient. */
  at: (timeS: number) => number;
  /** Time after which the output stays within the band about the steady state, from t = 0; null if it could not be found. */
  settledAfterS: number | null;
  settledAfterCycles: number | null;
  /** Half width of the band, in the unit of the output. */
  band: number;
  rounding: number;
}

/**
 * Output of stages at rest when a periodic input sets in at t = 0, by Laplace transform: an order √2 X cos(hωt + φ) has the
 * transform Re-part of √2 X e^(jφ)/(s − jhω); its poles on the axis give the steady state, the poles of the stages the
 * transient, in closed form and with all orders together. Of a closed loop with a delay the steady state is exact, the
 * transient that of its Padé approximant.
 *
 * @param percent of the peak of the steady state, default 1: within it the output counts as settled
 * @returns why there is no steady state, when a stage is not stable
 * @throws AnalysisInputError for a series with orders of unknown phase, or improper stages, which answer the onset with an
 *   impulse
 */
export function periodicTransient(
  input: FourierSeries,
  chain: StageChain,
  percent = 1,
): PeriodicTransient | { isDefined: false; verdict: StabilityVerdict; reason: string } {
  checkSeries(input);
  if (!(percent > 0 && percent < 100)) {
    throw new AnalysisInputError(`The band is ${percent} %; it must lie between 0 and 100 %.`);
  }
  const undrawn = undrawnOrders(input);
  if (undrawn.length > 0) {
    throw new AnalysisInputError(
      `The phase of order ${undrawn[0]} is not known; the transient depends on it. Give it, or leave the order out.`,
    );
  }
  const state = steadyStateOf(input, chain);
  if (!state.isDefined) return state;
  const { numerator, denominator, delayS = 0 } = inSeries(chain);
  if (numerator.length > denominator.length) {
    throw new AnalysisInputError(
      'The stages are improper (the numerator has the higher degree): they answer the onset with an impulse. Add a low-pass.',
    );
  }
  const all = chainPoles(chain);
  const terms = exponentialTerms(
    all.map((pole) => ({
      pole: { re: pole.re, im: pole.im },
      residues: residuesAt(numerator, denominator[0]!, all, pole, [
        inputTaylor(input, pole, pole.multiplicity),
      ]),
    })),
  );
  const maxOrder = Math.max(1, ...input.components.map(({ order }) => order));
  const band = (percent / 100) * (seriesFigures(state.series, maxOrder).peak ?? 0);
  const settled = lastTimeOutside(terms, band);
  const settledAfterS = settled === null ? null : settled + delayS;
  return {
    isDefined: true,
    ...{ series: state.series, terms, delayS, band, settledAfterS },
    at: (timeS) =>
      timeS < delayS
        ? 0
        : seriesValue(state.series, timeS * input.frequencyHz) + sumAt(terms, timeS - delayS),
    settledAfterCycles: settledAfterS === null ? null : settledAfterS * input.frequencyHz,
    rounding: roundingOf(terms),
  };
}

/** Ascending Taylor coefficients of the transform of the input about a pole. */
function inputTaylor({ frequencyHz, dc, components }: FourierSeries, at: Complex, count: number): Complex[] {
  const out = Array.from({ length: count }, () => ({ re: 0, im: 0 }));
  const addPole = (factor: Complex, pole: Complex) => {
    const distance = { re: at.re - pole.re, im: at.im - pole.im };
    // 1/(d + u) = 1/d − u/d² + …
    let term = complexDivide(factor, distance);
    for (let k = 0; k < count; k++) {
      out[k] = complexAdd(out[k]!, term);
      term = complexDivide({ re: -term.re, im: -term.im }, distance);
    }
  };
  if (dc !== 0) addPole({ re: dc, im: 0 }, { re: 0, im: 0 });
  for (const { order, rms, phaseDeg } of components) {
    if (rms === 0) continue;
    const phasor = fromPolar(rms / Math.SQRT2, phaseDeg ?? 0);
    const omega = 2 * Math.PI * order * frequencyHz;
    addPole(phasor, { re: 0, im: omega });
    addPole({ re: phasor.re, im: -phasor.im }, { re: 0, im: -omega });
  }
  return out;
}
