import FFT from 'fft.js';

/** A prepared chirp transform: `outputLength` lines of an `inputLength`-point complex sequence. */
export interface ChirpPlan {
  readonly inputLength: number;
  readonly outputLength: number;
  /** Interleaved complex input (2·inputLength) and output (2·outputLength). */
  transform(input: ArrayLike<number>, output: Float64Array | number[]): void;
}

/**
 * Chirp-z transform X_k = Σ_n x_n e^(−jαkn) for equally spaced frequencies (Rabiner, Schafer, Rader, "The chirp
 * z-transform algorithm", IEEE Trans. Audio Electroacoust. AU-17, 1969).
 *
 * @param chirpPhase the phase α i²/2 in radians; it is asked once for every index and kept in the plan's tables
 */
export function createChirpPlan(
  inputLength: number,
  outputLength: number,
  chirpPhase: (index: number) => number,
): ChirpPlan {
  const size = Math.max(4, 2 ** Math.ceil(Math.log2(inputLength + outputLength - 1)));
  const fft = new FFT(size);
  const chirp = chirpTable(Math.max(inputLength, outputLength), chirpPhase);
  const filter = filterSpectrum(fft, chirp, inputLength, outputLength);
  const work = fft.createComplexArray() as number[];
  const spectrum = fft.createComplexArray() as number[];

  function transform(input: ArrayLike<number>, output: Float64Array | number[]): void {
    work.fill(0, 2 * inputLength);
    multiplyInto(work, input, chirp, inputLength);
    fft.transform(spectrum, work);
    multiplyInto(spectrum, spectrum, filter, size);
    fft.inverseTransform(work, spectrum);
    multiplyInto(output, work, chirp, outputLength);
  }
  return { inputLength, outputLength, transform };
}

function chirpTable(length: number, chirpPhase: (index: number) => number): Float64Array {
  const table = new Float64Array(2 * length);
  for (let i = 0; i < length; i++) {
    const phase = chirpPhase(i);
    table[2 * i] = Math.cos(phase);
    table[2 * i + 1] = -Math.sin(phase);
  }
  return table;
}

function filterSpectrum(fft: FFT, chirp: Float64Array, inputLength: number, outputLength: number): number[] {
  const taps = fft.createComplexArray() as number[];
  const spectrum = fft.createComplexArray() as number[];
  for (let i = 0; i < outputLength; i++) {
    taps[2 * i] = chirp[2 * i]!;
    taps[2 * i + 1] = -chirp[2 * i + 1]!;
  }
  for (let i = 1; i < inputLength; i++) {
    const mirrored = 2 * (fft.size - i);
    taps[mirrored] = chirp[2 * i]!;
    taps[mirrored + 1] = -chirp[2 * i + 1]!;
  }
  fft.transform(spectrum, taps);
  return spectrum;
}

function multiplyInto(
  out: Float64Array | number[],
  a: ArrayLike<number>,
  b: ArrayLike<number>,
  count: number,
): void {
  for (let i = 0; i < 2 * count; i += 2) {
    const re = a[i]! * b[i]! - a[i + 1]! * b[i + 1]!;
    out[i + 1] = a[i]! * b[i + 1]! + a[i + 1]! * b[i]!;
    out[i] = re;
  }
}
