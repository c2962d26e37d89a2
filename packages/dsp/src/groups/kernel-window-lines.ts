import { createPlanCache } from '../fft/plan-cache.js';
import { lineTables } from '../lines/line-tables.js';
import { createKernel } from '../wasm/kernel.js';
import { leakageCurve, orderFit } from './leakage.js';
import { leakageColumns } from './leakage-nodes.js';
import { createWindowBench, type WindowBench, type WindowTables } from './window-bench.js';
import { ordersOf, type WindowLinePlan, type WindowShape } from './window-shape.js';

/** Windows of lengths up to the next multiple share a bench, so that a drifting frequency costs tables only. */
const LENGTH_STEP = 64;

/** Longer ones would need more memory than a kernel can have. */
const LONGEST_WINDOW = 2 ** 23;

const benches = createPlanCache<WindowBench | null>();

/** `createWindowLines` as compiled code; null for very long windows and where the platform has no WebAssembly SIMD. */
export function createKernelWindowLines(shape: WindowShape): WindowLinePlan | null {
  const { sampleCount, windowSamples, cycles, lineCount } = shape;
  if (sampleCount > LONGEST_WINDOW) return null;
  const capacity = LENGTH_STEP * Math.ceil(sampleCount / LENGTH_STEP);
  const orderCount = ordersOf(shape);
  const bench = benches.get(`${capacity} ${lineCount} ${cycles} ${orderCount}`, capacity, () => {
    const kernel = createKernel();
    const lengths = { shortest: capacity - LENGTH_STEP, longest: capacity };
    return kernel && createWindowBench(kernel, lengths, lineCount, cycles, orderCount);
  });
  if (bench === null) return null;
  const frequencies = Float64Array.from({ length: lineCount }, (_, k) => k / windowSamples);
  const curve = leakageCurve(sampleCount, windowSamples);
  const tables: WindowTables = {
    lines: lineTables(bench.frame, sampleCount, frequencies),
    leakage: curve && {
      fit: orderFit(curve, cycles, orderCount),
      columns: leakageColumns(bench.nodes, curve, cycles, orderCount),
    },
  };
  return {
    ...{ sampleCount, windowSamples, lineCount },
    amplitudes(samples, start, cosine, sine, rms) {
      const square = bench.analyse(tables, samples, start, sampleCount);
      cosine.set(bench.cosine);
      sine.set(bench.sine);
      rms?.set(bench.rms);
      return Math.sqrt(square);
    },
  };
}
