const BAND_HZ = 200;
const FIRST_CENTRE_HZ = 2100;
const LAST_CENTRE_HZ = 8900;
/** Wider lines leave too few of them in a band. */
const WIDEST_LINE_HZ = 10;

/**
 * Centres of the 200 Hz bands between 2 kHz and 9 kHz that lie wholly below half the sample rate (IEC 61000-4-7:2002 +
 * A1:2008, annex B: 2.1, 2.3 … 8.9 kHz); none when the lines are wider than 10 Hz.
 */
export function highFrequencyBandCentres(sampleRateHz: number, lineHz: number): Float64Array {
  const centres: number[] = [];
  for (
    let centre = FIRST_CENTRE_HZ;
    lineHz <= WIDEST_LINE_HZ && centre <= LAST_CENTRE_HZ;
    centre += BAND_HZ
  ) {
    if (centre + BAND_HZ / 2 + lineHz / 2 < sampleRateHz / 2) centres.push(centre);
  }
  return Float64Array.from(centres);
}

/** Lines that a spectrum must have, from line 0 on, to hold these bands. */
export function linesForBands(centresHz: Float64Array, lineHz: number): number {
  return centresHz.length === 0 ? 0 : bandLines(centresHz[centresHz.length - 1]!, lineHz).to;
}

/**
 * Y_B,b: root of the sum of squares of the lines of one band. The lines are those of the synchronous window of about
 * 200 ms (the annex asks for 200 ms and no synchronism). Line k belongs to the band when k·f_line lies above
 * b − 100 Hz + f_line/2 and not above b + 100 Hz + f_line/2: with lines of 5 Hz the 40 lines from b − 95 Hz to
 * b + 100 Hz of the annex, and the same lines still when the mains frequency is a little off.
 *
 * @param lineHz spacing of the lines
 */
export function highFrequencyBand(lineRms: ArrayLike<number>, lineHz: number, centreHz: number): number {
  const { from, to } = bandLines(centreHz, lineHz);
  let sum = 0;
  for (let k = from; k < to; k++) sum += lineRms[k]! ** 2;
  return Math.sqrt(sum);
}

function bandLines(centreHz: number, lineHz: number): { from: number; to: number } {
  const after = (edgeHz: number) => Math.floor(edgeHz / lineHz + 0.5) + 1;
  return { from: after(centreHz - BAND_HZ / 2), to: after(centreHz + BAND_HZ / 2) };
}
