import { createKernelTransform } from '../fft/kernel-transform.js';
import { createPlanCache } from '../fft/plan-cache.js';
import { createKernel, type Kernel } from '../wasm/kernel.js';
import type { SegmentPower } from './segment-power.js';

/**
 * `createSegmentPower` as compiled code; null where the platform has no WebAssembly SIMD. Two segments ride in one complex
 * transform: with z = a + jb, |A_k|² + |B_k|² = (|Z_k|² + |Z_(N−k)|²)/2. Sums of one length share the memory that they
 * are computed in.
 */
export function createKernelSegmentPower(window: Float64Array, removeMean: boolean): SegmentPower | null {
  const length = window.length;
  const bench = benches.get(`${length}`, length, () => {
    const kernel = createKernel();
    return kernel && createBench(kernel, length);
  });
  if (bench === null) return null;
  const task: SumTask = { window, removeMean, power: null, pending: null };
  return {
    get sum() {
      return bench.foldedPower(task);
    },
    add(samples, offset) {
      bench.add(task, samples, offset);
    },
  };
}

/** One sum of powers. */
interface SumTask {
  window: Float64Array;
  removeMean: boolean;
  /** Σ|Z_k|² while another sum is in memory; null before the first segment. */
  power: Float64Array | null;
  /** A segment that waits for its partner meanwhile. The pairs of a sum never depend on other sums. */
  pending: Float64Array | null;
}

/** The memory in which segments of one length are transformed, with one sum at a time. */
interface SegmentBench {
  add(task: SumTask, samples: Float64Array, offset: number): void;
  /** Σ|X_k|², DC to half the sample rate. */
  foldedPower(task: SumTask): Float64Array;
}

const benches = createPlanCache<SegmentBench | null>();

function createBench(kernel: Kernel, length: number): SegmentBench {
  const transform = createKernelTransform(kernel, length);
  const slots = [kernel.allocate(length + 1), kernel.allocate(length + 1)] as const;
  const windowAt = kernel.allocate(length + 1);
  const powerAt = kernel.allocate(length);
  const slotViews = slots.map((address) => kernel.floats(address, length));
  const power = kernel.floats(powerAt, length);
  const { addPowerEven, addPowerOdd, mean, pairSegments } = kernel.functions;
  const addPower = length % 2 === 0 ? addPowerEven : addPowerOdd;
  let current: SumTask | null = null;
  let held = 0;

  /** Adds the segments in the slots; a missing second one counts as zeros. */
  function addHeld({ removeMean }: SumTask): void {
    if (held === 0) return;
    if (held === 1) slotViews[1]!.fill(0);
    const [meanA, meanB] = removeMean ? [mean(slots[0], length), mean(slots[1], length)] : [0, 0];
    pairSegments(...slots, windowAt, length, meanA, meanB, transform.source);
    addPower(transform.run(), length, powerAt);
    held = 0;
  }

  function turnTo(task: SumTask): void {
    if (current === task) return;
    if (current !== null) {
      current.power = power.slice();
      current.pending = held === 1 ? slotViews[0]!.slice() : null;
    }
    kernel.floats(windowAt, length).set(task.window);
    if (task.power === null) power.fill(0);
    else power.set(task.power);
    held = task.pending === null ? 0 : 1;
    if (task.pending !== null) slotViews[0]!.set(task.pending);
    current = task;
  }

  return {
    add(task, samples, offset) {
      turnTo(task);
      slotViews[held]!.set(samples.subarray(offset, offset + length));
      held++;
      if (held === 2) addHeld(task);
    },
    foldedPower(task) {
      turnTo(task);
      addHeld(task);
      const folded = new Float64Array(Math.floor(length / 2) + 1);
      for (let k = 0; k < folded.length; k++) folded[k] = (power[k]! + power[(length - k) % length]!) / 2;
      return folded;
    },
  };
}
