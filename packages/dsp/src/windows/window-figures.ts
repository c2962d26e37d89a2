export interface WindowFigures {
  /** Mean of the window: what the amplitude of a line is multiplied by. */
  coherentGain: number;
  /** Equivalent noise bandwidth in bins. */
  enbwBins: number;
}

/** Coherent gain mean(w) and ENBW N Σw²/(Σw)² (F. J. Harris, Proc. IEEE 66(1), 1978, section IV). */
export function windowFigures(window: Float64Array): WindowFigures {
  let sum = 0;
  let squares = 0;
  for (const w of window) {
    sum += w;
    squares += w * w;
  }
  return { coherentGain: sum / window.length, enbwBins: (window.length * squares) / (sum * sum) };
}
