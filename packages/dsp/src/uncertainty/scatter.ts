/** Fewer values say too little of their scatter: JCGM 101:2008, 6.4.9.4 is defined from four on. */
const FEWEST = 4;

/**
 * Standard uncertainty of the root mean square √(mean x²) of window values from their scatter: that of the mean of the
 * squares (type A, JCGM 100:2008, 4.2.3: s/√n), divided by twice the result. Where the values scatter little it equals
 * s/√n of the values themselves.
 *
 * s of few values is itself uncertain, so that k = 2 would cover less than 95 %; the factor √((n − 1)/(n − 3)) is the
 * standard deviation of Student's t and makes up for it (JCGM 101:2008, 6.4.9.4).
 *
 * @param values one per window; those that are not a number are left out
 * @param skip 1 where a window is left out
 * @returns null for fewer than four values
 */
export function quadraticMeanScatter(values: ArrayLike<number>, skip: ArrayLike<number>): number | null {
  let count = 0;
  let sum = 0;
  for (let j = 0; j < values.length; j++) {
    if (skip[j] === 1 || Number.isNaN(values[j]!)) continue;
    count++;
    sum += values[j]! ** 2;
  }
  if (count < FEWEST) return null;
  const mean = sum / count;
  if (mean === 0) return 0;
  let deviations = 0;
  for (let j = 0; j < values.length; j++) {
    if (skip[j] === 1 || Number.isNaN(values[j]!)) continue;
    deviations += (values[j]! ** 2 - mean) ** 2;
  }
  const ofMeanSquare = Math.sqrt(deviations / (count - 1) / count) * Math.sqrt((count - 1) / (count - 3));
  return ofMeanSquare / (2 * Math.sqrt(mean));
}
