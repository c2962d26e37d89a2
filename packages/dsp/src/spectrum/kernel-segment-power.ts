import { createKernelTransform } from '../fft/kernel-transform.js';
import type { Kernel } from '../wasm/kernel.js';
import type { SegmentPower } from './segment-power.js';

/**
 * Powers of windowed segments, two at a time: with z = a + jb, |A_k|² + |B_k|² = (|Z_k|² + |Z_(N−k)|²)/2. The kernel
 * belongs to the sum.
 */
export function createKernelSegmentPower(
  kernel: Kernel,
  window: Float64Array,
  removeMean: boolean,
): SegmentPower {
  const length = window.length;
  const transform = createKernelTransform(kernel, length);
  const slots = [kernel.allocate(length + 1), kernel.allocate(length + 1)] as const;
  const windowAt = kernel.allocate(length + 1);
  const powerAt = kernel.allocate(length);
  kernel.floats(windowAt, length).set(window);
  const slotViews = slots.map((address) => kernel.floats(address, length));
  const power = kernel.floats(powerAt, length);
  const { addPowerEven, addPowerOdd, mean, pairSegments } = kernel.functions;
  const addPower = length % 2 === 0 ? addPowerEven : addPowerOdd;
  let held = 0;

  function addHeld(): void {
    const [meanA, meanB] = removeMean ? [mean(slots[0], length), mean(slots[1], length)] : [0, 0];
    pairSegments(...slots, windowAt, length, meanA, meanB, transform.source);
    addPower(transform.run(), length, powerAt);
    held = 0;
  }

  return {
    get sum() {
      if (held === 1) {
        slotViews[1]!.fill(0);
        addHeld();
      }
      return Float64Array.from(
        { length: Math.floor(length / 2) + 1 },
        (_, k) => (power[k]! + power[(length - k) % length]!) / 2,
      );
    },
    add(samples, offset) {
      slotViews[held]!.set(samples.subarray(offset, offset + length));
      held++;
      if (held === 2) addHeld();
    },
  };
}
