export interface WindowGains {
  /** Mean of the window: what the amplitude of a line is multiplied by. */
  coherentGain: number;
  /** Equivalent noise bandwidth in bins. */
  enbwBins: number;
}

/** Coherent gain mean(w) and ENBW N Σw²/(Σw)² (F. J. Harris, Proc. IEEE 66(1), 1978, section IV). */
export function windowGains(window: Float64Array): WindowGains {
  const { sum, squares } = windowSums(window);
  return { coherentGain: sum / window.length, enbwBins: (window.length * squares) / (sum * sum) };
}

/** What the amplitude of a steady tone in a windowed transform is multiplied by to be right: 1/mean(w). */
export function amplitudeCorrection(window: Float64Array): number {
  return window.length / windowSums(window).sum;
}

/** What the power of a windowed record is multiplied by to be that of the record, in the mean: 1/mean(w²). */
export function powerCorrection(window: Float64Array): number {
  return window.length / windowSums(window).squares;
}

/** S1 = Σw and S2 = Σw² (G. Heinzel, A. Rüdiger, R. Schilling, "Spectrum and spectral density estimation by the DFT", 2002). */
export function windowSums(window: Float64Array): { sum: number; squares: number } {
  let sum = 0;
  let squares = 0;
  for (const w of window) {
    sum += w;
    squares += w * w;
  }
  return { sum, squares };
}
