/** A prepared line analysis of windows of one length. The plan holds scratch space; use one per thread. */
export interface WindowLinePlan {
  /** Whole samples that one window takes. */
  readonly sampleCount: number;
  /** Exact length of the window in samples, may be fractional. */
  readonly windowSamples: number;
  /** Lines k = 0..lineCount − 1 at the frequencies k/windowSamples (cycles per sample). */
  readonly lineCount: number;
  /**
   * Amplitudes of x[n] = Σ_k cosine[k] cos(θ_k (n − c)) + sine[k] sin(θ_k (n − c)), θ_k = 2πk/windowSamples, of the window
   * that starts at sample `start`. Time is counted from the centre of the window, c = start + (sampleCount − 1)/2; the
   * cosine phase of line k at any position p is atan2(−sine[k], cosine[k]) + θ_k (p − c).
   *
   * @param cosine receives lineCount peak amplitudes (line 0: the mean)
   * @param sine receives lineCount peak amplitudes
   * @param rms receives lineCount rms values, if given (`lineRms`)
   * @returns rms value of all samples of the window
   */
  amplitudes(
    samples: Float64Array,
    start: number,
    cosine: Float64Array,
    sine: Float64Array,
    rms?: Float64Array,
  ): number;
}

/** What a line analysis is made for; see `createWindowLines`. */
export interface WindowShape {
  sampleCount: number;
  windowSamples: number;
  cycles: number;
  maxOrder: number;
  lineCount: number;
}

/** Orders whose leakage is taken out, DC included. */
export function ordersOf({ cycles, maxOrder, lineCount }: WindowShape): number {
  return Math.min(maxOrder, Math.floor((lineCount - 1) / cycles)) + 1;
}

/** rms values of lines given as peak amplitudes; line 0 is the magnitude of the mean. */
export function lineRms(cosine: Float64Array, sine: Float64Array): Float64Array {
  return cosine.map((c, k) => (k === 0 ? Math.abs(c) : Math.hypot(c, sine[k]!) / Math.SQRT2));
}
