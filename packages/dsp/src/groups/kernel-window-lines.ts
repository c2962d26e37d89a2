import { createPlanCache } from '../fft/plan-cache.js';
import { GATHERED_LINES } from '../lines/kaiser-bessel.js';
import { createLineFrame, type LineFrame } from '../lines/line-frame.js';
import { lineTables, type LineTables } from '../lines/line-tables.js';
import { createKernel, type Kernel } from '../wasm/kernel.js';
import { windowLeakage, type Leakage } from './leakage.js';
import type { WindowLinePlan, WindowShape } from './window-lines.js';

/** Windows of lengths up to the next multiple share a bench, so that a drifting frequency costs tables only. */
const LENGTH_STEP = 64;

const benches = createPlanCache<WindowBench | null>();

/** `createWindowLines` as compiled code; null where the platform has no WebAssembly SIMD. */
export function createKernelWindowLines(shape: WindowShape): WindowLinePlan | null {
  const { sampleCount, windowSamples, cycles, maxOrder, lineCount } = shape;
  const capacity = LENGTH_STEP * Math.ceil(sampleCount / LENGTH_STEP);
  const orderCount = Math.min(maxOrder, Math.floor((lineCount - 1) / cycles)) + 1;
  const bench = benches.get(`${capacity} ${lineCount} ${cycles} ${orderCount}`, capacity, () => {
    const kernel = createKernel();
    return kernel && createBench(kernel, capacity, lineCount, cycles, orderCount);
  });
  if (bench === null) return null;
  const frequencies = Float64Array.from({ length: lineCount }, (_, k) => k / windowSamples);
  const tables = lineTables(bench.frame, sampleCount, frequencies);
  const leakage = windowLeakage(sampleCount, windowSamples, cycles, maxOrder, lineCount);
  return {
    ...{ sampleCount, windowSamples, lineCount },
    amplitudes(samples, start, cosine, sine) {
      bench.load(tables, leakage);
      bench.frame.transform(samples, start, sampleCount);
      bench.writeLines(leakage !== null);
      cosine.set(bench.cosine);
      sine.set(bench.sine);
    },
  };
}

/** The memory in which windows of about one length are analysed, with the tables of one plan at a time. */
interface WindowBench {
  readonly frame: LineFrame;
  /** The lines of the window analysed last. */
  readonly cosine: Float64Array;
  readonly sine: Float64Array;
  load(tables: LineTables, leakage: Leakage | null): void;
  writeLines(withLeakage: boolean): void;
}

function createBench(
  kernel: Kernel,
  capacity: number,
  lineCount: number,
  cycles: number,
  orderCount: number,
): WindowBench {
  // The shortest window that comes here has the lines farthest apart.
  const highest = Math.min(0.5, lineCount / (capacity - LENGTH_STEP));
  const frame = createLineFrame(kernel, capacity, highest);
  const padded = 4 * Math.ceil(lineCount / 4);
  const rowLength = 2 * Math.ceil(orderCount / 2);
  const reach = cycles * orderCount;
  const starts = kernel.allocate(Math.ceil(lineCount / 2));
  const weights = kernel.allocate(lineCount * GATHERED_LINES);
  const factors = kernel.allocate(2 * lineCount);
  const cosineFactor = kernel.allocate(rowLength * orderCount);
  const sineFactor = kernel.allocate(rowLength * orderCount);
  const leakageKernel = kernel.allocate(2 * reach + padded);
  const orderCosine = kernel.allocate(rowLength);
  const orderSine = kernel.allocate(rowLength);
  const cosineAt = kernel.allocate(padded);
  const sineAt = kernel.allocate(padded);
  const { fitOrders, gatherLines, removeLeakage } = kernel.functions;
  let loaded: LineTables | null = null;

  return {
    frame,
    cosine: kernel.floats(cosineAt, lineCount),
    sine: kernel.floats(sineAt, lineCount),
    load(tables, leakage) {
      if (loaded === tables) return;
      loaded = tables;
      kernel.integers(starts, lineCount).set(tables.starts);
      kernel.floats(weights, tables.weights.length).set(tables.weights);
      kernel.floats(factors, tables.factors.length).set(tables.factors);
      if (leakage === null) return;
      layRows(
        kernel.floats(cosineFactor, rowLength * orderCount),
        leakage.cosineFactor,
        orderCount,
        rowLength,
      );
      layRows(kernel.floats(sineFactor, rowLength * orderCount), leakage.sineFactor, orderCount, rowLength);
      const symmetric = kernel.floats(leakageKernel, 2 * reach + padded);
      for (let i = 0; i < symmetric.length; i++) symmetric[i] = leakage.kernel[Math.abs(i - reach)] ?? 0;
    },
    writeLines(withLeakage) {
      gatherLines(frame.re, frame.im, starts, weights, GATHERED_LINES, factors, lineCount, cosineAt, sineAt);
      if (!withLeakage) return;
      fitOrders(cosineAt, cycles, orderCount, 2, cosineFactor, orderCosine);
      fitOrders(sineAt, cycles, orderCount, 1, sineFactor, orderSine);
      const centre = leakageKernel + 8 * reach;
      removeLeakage(centre, cycles, orderCount, orderCosine, orderSine, lineCount, cosineAt, sineAt);
    },
  };
}

function layRows(target: Float64Array, rows: Float64Array, count: number, rowLength: number): void {
  for (let h = 0; h < count; h++) target.set(rows.subarray(h * count, (h + 1) * count), h * rowLength);
}
