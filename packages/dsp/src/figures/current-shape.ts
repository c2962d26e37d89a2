import { fitSinusoids } from '../model/fit-sinusoids.js';

/** When a current starts to flow, has its last peak and stops, in degrees of its half cycle. */
export interface CurrentShapeAngles {
  startsDeg: number;
  peakDeg: number;
  endsDeg: number;
}

export interface CurrentShapeInput {
  /** The same stretch of at least two cycles of both. */
  current: Float64Array;
  voltage: Float64Array;
  sampleRateHz: number;
  /** Fundamental of the voltage. */
  frequencyHz: number;
}

/** A current flows from 5 % of its highest peak on; a peak stands out by as much. */
const FLOW_SHARE = 0.05;
const CUTOFF_HZ = 9000;
const TRANSITION_HZ = 2000;
/** Fewer samples in half a cycle do not tell angles to a few degrees. */
const LEAST_PER_HALF_CYCLE = 50;

/**
 * The shape of a lamp's current against its voltage (IEC 61000-3-2, 7.4.3, alternative 2).
 *
 * Angles count from the zero crossing of the fundamental voltage, 0 to 180, in the half cycle that holds the highest
 * absolute peak of the stretch. The current flows from the first to the last moment at which it is at 5 % of that peak;
 * its last peak is the last maximum that rises and falls by 5 % of it. Content above 9 kHz is taken out first (FIR,
 * Blackman window). From memory: the standard names the 5 %; what counts as a peak of its own is set here.
 *
 * @returns null where the stretch is too short or too coarse to tell, or holds no voltage or current
 */
export function currentShape(input: CurrentShapeInput): CurrentShapeAngles | null {
  const { voltage, sampleRateHz, frequencyHz } = input;
  const cycle = sampleRateHz / frequencyHz;
  if (cycle / 2 < LEAST_PER_HALF_CYCLE || voltage.length < 2 * cycle) return null;
  if (input.current.some(Number.isNaN)) return null;
  const [fundamental] = fitSinusoids(voltage, sampleRateHz, [frequencyHz]).components;
  if (fundamental === undefined || !(fundamental.rms > 0)) return null;
  const { values, first } = withoutHighContent(input.current, sampleRateHz);
  // Cosine form: the rising zero crossing is at a phase of -90 degrees.
  const turnsAt = (index: number): number =>
    ((fundamental.phaseDeg + 90) / 360 + (first + index) / cycle) * 2;
  const half = halfCycleOfPeak(values, turnsAt, cycle);
  return half && anglesOf(half);
}

interface HalfCycle {
  /** Absolute values from its zero crossing to the next. */
  values: Float64Array;
  /** Degrees of each value. */
  degrees: Float64Array;
}

/** The half cycle, whole within the stretch, that holds the highest absolute value. */
function halfCycleOfPeak(
  values: Float64Array,
  halvesAt: (index: number) => number,
  cycle: number,
): HalfCycle | null {
  const perHalf = cycle / 2;
  const begin = (Math.ceil(halvesAt(0)) - halvesAt(0)) * perHalf;
  const halves = Math.floor((values.length - 1 - begin) / perHalf);
  const end = begin + halves * perHalf;
  let peak = -1;
  for (let i = Math.ceil(begin); i <= end && i < values.length; i += 1) {
    if (peak === -1 || Math.abs(values[i]!) > Math.abs(values[peak]!)) peak = i;
  }
  if (halves < 1 || peak === -1 || values[peak] === 0) return null;
  const zero = begin + Math.min(halves - 1, Math.floor((peak - begin) / perHalf)) * perHalf;
  const from = Math.ceil(zero);
  const part = values.slice(from, Math.min(values.length, Math.floor(zero + perHalf) + 1));
  return {
    values: part.map(Math.abs),
    degrees: part.map((_, i) => (180 * (from + i - zero)) / perHalf),
  };
}

function anglesOf({ values, degrees }: HalfCycle): CurrentShapeAngles {
  const highest = values.reduce((max, value) => Math.max(max, value), 0);
  const floor = FLOW_SHARE * highest;
  const start = values.findIndex((value) => value >= floor);
  const end = values.findLastIndex((value) => value >= floor);
  return {
    startsDeg: degrees[start]!,
    peakDeg: degrees[lastPeak(values, floor)]!,
    endsDeg: degrees[end]!,
  };
}

/** Index of the last maximum from which values fall by `prominence` on, and to which they rose by it. */
function lastPeak(values: Float64Array, prominence: number): number {
  let peak = 0;
  let highest = 0;
  let lowest = Infinity;
  let rising = true;
  values.forEach((value, i) => {
    if (rising) {
      if (value > values[highest]!) highest = i;
      if (value <= values[highest]! - prominence) {
        peak = highest;
        rising = false;
        lowest = value;
      }
    } else {
      lowest = Math.min(lowest, value);
      if (value >= lowest + prominence) {
        rising = true;
        highest = i;
      }
    }
  });
  return rising && values[highest]! > 0 ? highest : peak;
}

/** The values without content above 9 kHz, and where in the given ones the first of them stands. */
function withoutHighContent(
  values: Float64Array,
  sampleRateHz: number,
): { values: Float64Array; first: number } {
  if (sampleRateHz <= 2 * (CUTOFF_HZ + TRANSITION_HZ)) return { values, first: 0 };
  // Width of the main lobe of a Blackman window: 5.5 bins to either side of the edge.
  const reach = Math.ceil((2.75 * sampleRateHz) / TRANSITION_HZ);
  const taps = lowPass(reach, CUTOFF_HZ / sampleRateHz);
  const length = Math.max(0, values.length - 2 * reach);
  const out = new Float64Array(length);
  for (let i = 0; i < length; i += 1) {
    let sum = 0;
    for (let k = 0; k < taps.length; k += 1) sum += taps[k]! * values[i + k]!;
    out[i] = sum;
  }
  return { values: out, first: reach };
}

/** Windowed sinc of 2·reach + 1 taps that pass a constant unchanged; `edge` in cycles per sample. */
function lowPass(reach: number, edge: number): Float64Array {
  const taps = Float64Array.from({ length: 2 * reach + 1 }, (_, i) => {
    const at = i - reach;
    const turn = (Math.PI * at) / (reach + 1);
    const blackman = 0.42 + 0.5 * Math.cos(turn) + 0.08 * Math.cos(2 * turn);
    const sinc = at === 0 ? 2 * edge : Math.sin(2 * Math.PI * edge * at) / (Math.PI * at);
    return blackman * sinc;
  });
  const gain = taps.reduce((sum, tap) => sum + tap, 0);
  return taps.map((tap) => tap / gain);
}
