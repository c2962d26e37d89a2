/** A spectrum as frequencies and rms values of its lines. */
export interface Lines {
  frequencyHz: number[];
  rms: number[];
}

/**
 * Thins equally spaced lines to at most `maxPoints`: of each run of neighbouring lines the largest stays, at its own
 * frequency, so that every peak keeps its place and height.
 */
export function thinned(rms: Float64Array, startHz: number, stepHz: number, maxPoints: number): Lines {
  const run = Math.max(1, Math.ceil(rms.length / maxPoints));
  const lines: Lines = { frequencyHz: [], rms: [] };
  for (let from = 0; from < rms.length; from += run) {
    let largest = from;
    const end = Math.min(rms.length, from + run);
    for (let i = from + 1; i < end; i += 1) if (rms[i]! > rms[largest]!) largest = i;
    lines.frequencyHz.push(startHz + largest * stepHz);
    lines.rms.push(rms[largest]!);
  }
  return lines;
}
