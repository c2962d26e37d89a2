/** How far a window may be from whole cycles. */
export interface Synchronism {
  /** Cycles per window. */
  cycles: number;
  /** Largest deviation of a window's length from whole cycles, relative. */
  error: number;
}

/**
 * Share of its rms that a line of order h loses in a rectangular window of N cycles whose length is off by the relative
 * error ε: the line then lies h N ε bins beside its place and reads sin(π h N ε)/(π h N ε) of its rms
 * (IEC 61000-4-7, 4.4.1, allows ε = 0.03 %: 2.35 % of order 40).
 */
export function lineLoss(order: number, { cycles, error }: Synchronism): number {
  return 1 - sinc(order * cycles * error);
}

/**
 * Largest share of the fundamental's rms that leaks into the line of order h of such a window: side lobes of the
 * rectangular window at the distances (h − 1)N and (h + 1)N of the two ends of the fundamental, |sin(π N ε)|/π over the
 * distance, adding up at the worst phase. Of order 1 only the far end counts.
 */
export function fundamentalLeakage(order: number, { cycles, error }: Synchronism): number {
  const offset = cycles * Math.abs(error);
  const height = Math.abs(Math.sin(Math.PI * offset)) / Math.PI;
  const far = height / (cycles * (order + 1) + offset);
  return order === 1 ? far : far + height / (cycles * (order - 1) - offset);
}

/**
 * Largest share by which the rms of a sine is off that was taken over c cycles with a broken one: the mean square holds
 * sin(2πc)/(2πc) of it at the worst phase, the rms half of that.
 */
export function brokenCycle(cycles: number): number {
  return Math.abs(Math.sin(2 * Math.PI * cycles)) / (4 * Math.PI * cycles);
}

function sinc(bins: number): number {
  const angle = Math.PI * bins;
  return angle === 0 ? 1 : Math.sin(angle) / angle;
}
