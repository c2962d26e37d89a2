export interface SynthesisComponent {
  order: number;
  rms: number;
  /** Cosine form, zero time = first point. */
  phaseDeg: number;
}

/**
 * One cycle of the waveform X0 + Σ √2 X_h cos(2πh n/N + φ_h), n = 0..N−1.
 *
 * @param pointCount N, at least 2
 * @throws RangeError when N is not an integer of at least 2
 */
export function synthesise(
  components: readonly SynthesisComponent[],
  pointCount: number,
  dc = 0,
): Float64Array {
  if (!Number.isInteger(pointCount) || pointCount < 2)
    throw new RangeError(`A cycle needs at least 2 points, got ${pointCount}`);
  const cosine = Float64Array.from({ length: pointCount }, (_, n) =>
    Math.cos((2 * Math.PI * n) / pointCount),
  );
  const sine = Float64Array.from({ length: pointCount }, (_, n) => Math.sin((2 * Math.PI * n) / pointCount));
  const out = new Float64Array(pointCount).fill(dc);
  for (const { order, rms, phaseDeg } of components) {
    const re = Math.SQRT2 * rms * Math.cos((phaseDeg * Math.PI) / 180);
    const im = Math.SQRT2 * rms * Math.sin((phaseDeg * Math.PI) / 180);
    // order · n modulo N, step by step.
    const step = order % pointCount;
    for (let n = 0, at = 0; n < pointCount; n++) {
      out[n]! += re * cosine[at]! - im * sine[at]!;
      at += step;
      if (at >= pointCount) at -= pointCount;
    }
  }
  return out;
}
