/** Values cos and sin of 2πk/length for k = 0..length − 1. */
export interface UnitTurns {
  cosine(k: number): number;
  sine(k: number): number;
}

/**
 * Points of the unit circle from two tables of about √length values each, the coarse and the fine turn multiplied; the
 * error stays within two units of the last place of 1.
 */
export function createUnitTurns(length: number): UnitTurns {
  const shift = Math.ceil(Math.log2(Math.max(1, length)) / 2);
  const mask = 2 ** shift - 1;
  const fineCos = new Float64Array(mask + 1);
  const fineSin = new Float64Array(mask + 1);
  const coarseCos = new Float64Array(Math.floor(length / (mask + 1)) + 1);
  const coarseSin = new Float64Array(coarseCos.length);
  for (let i = 0; i <= mask; i++) {
    fineCos[i] = Math.cos((2 * Math.PI * i) / length);
    fineSin[i] = Math.sin((2 * Math.PI * i) / length);
  }
  for (let i = 0; i < coarseCos.length; i++) {
    const angle = (2 * Math.PI * (i * (mask + 1))) / length;
    coarseCos[i] = Math.cos(angle);
    coarseSin[i] = Math.sin(angle);
  }
  return {
    cosine: (k) => coarseCos[k >> shift]! * fineCos[k & mask]! - coarseSin[k >> shift]! * fineSin[k & mask]!,
    sine: (k) => coarseSin[k >> shift]! * fineCos[k & mask]! + coarseCos[k >> shift]! * fineSin[k & mask]!,
  };
}
