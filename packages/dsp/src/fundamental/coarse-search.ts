import { harmonicAngles, highestOrder } from '../harmonics/harmonic-orders.js';
import { projections } from '../model/projections.js';
import { createSinusoidSolver } from '../model/sinusoid-solver.js';

const SEARCH_CYCLES = 8;
const SEARCH_ORDERS = 10;
const SAMPLES_PER_CYCLE = 64;

/**
 * The frequency between `lowHz` and `highHz` whose harmonic series (DC and up to 10 orders) explains most of a short
 * stretch in the middle of the record. A strong harmonic does not mislead it, since every order counts.
 */
export function coarseSearch(
  samples: Float64Array,
  sampleRateHz: number,
  lowHz: number,
  highHz: number,
): number {
  const length = Math.min(samples.length, Math.ceil((SEARCH_CYCLES * sampleRateHz) / lowHz));
  const start = Math.floor((samples.length - length) / 2);
  const factor = Math.max(1, Math.floor(sampleRateHz / (SAMPLES_PER_CYCLE * highHz)));
  const short = decimate(samples, start, length, factor);
  const rate = sampleRateHz / factor;
  const orders = Math.max(1, highestOrder(highHz, rate, short.length, SEARCH_ORDERS));
  const step = (0.15 * rate) / (short.length * orders);
  const steps = Math.max(1, Math.ceil((highHz - lowHz) / step));
  let best = lowHz;
  let bestPower = -Infinity;
  for (let i = 0; i <= steps; i++) {
    const f = lowHz + ((highHz - lowHz) * i) / steps;
    const angles = harmonicAngles(f, rate, orders);
    const sums = projections(short, 0, short.length, angles);
    const power = createSinusoidSolver(angles, short.length)(sums).explained;
    if (power > bestPower) {
      best = f;
      bestPower = power;
    }
  }
  return best;
}

/** Means of `factor` successive samples: enough of a low-pass for a first look at the lowest orders. */
function decimate(samples: Float64Array, start: number, length: number, factor: number): Float64Array {
  const out = new Float64Array(Math.floor(length / factor));
  for (let i = 0; i < out.length; i++) {
    let sum = 0;
    for (let k = 0; k < factor; k++) sum += samples[start + i * factor + k]!;
    out[i] = sum / factor;
  }
  return out;
}
