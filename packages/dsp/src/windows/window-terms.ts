export type WindowName =
  'rectangular' | 'hann' | 'hamming' | 'blackman' | 'blackman-harris' | 'nuttall' | 'flat-top' | 'kaiser';

export const WINDOW_NAMES: readonly WindowName[] = [
  ...(['rectangular', 'hann', 'hamming', 'blackman', 'blackman-harris', 'nuttall', 'flat-top'] as const),
  'kaiser',
];

/**
 * Coefficients a_k of w[n] = Σ (−1)^k a_k cos(2πkn/N).
 * Hann to Blackman-Harris (4 terms, minimum side lobe): F. J. Harris, Proc. IEEE 66(1), 1978, table 1.
 * Nuttall: A. H. Nuttall, IEEE Trans. ASSP-29(1), 1981, minimum 4-term. Flat-top: the usual five-term library form.
 */
export const COSINE_TERMS: Record<Exclude<WindowName, 'kaiser'>, readonly number[]> = {
  rectangular: [1],
  hann: [0.5, 0.5],
  hamming: [0.54, 0.46],
  blackman: [0.42, 0.5, 0.08],
  'blackman-harris': [0.35875, 0.48829, 0.14128, 0.01168],
  nuttall: [0.3635819, 0.4891775, 0.1365995, 0.0106411],
  'flat-top': [0.21557895, 0.41663158, 0.277263158, 0.083578947, 0.006947368],
};

/** β of a Kaiser window when none is asked for: side lobes below −66 dB. */
export const DEFAULT_KAISER_BETA = 9;
