/** Modified Bessel function I0(x) of the first kind by its power series (Abramowitz & Stegun 9.6.12). */
export function besselI0(x: number): number {
  const quarter = (x * x) / 4;
  let term = 1;
  let sum = 1;
  for (let k = 1; term > 1e-17 * sum; k++) {
    term *= quarter / (k * k);
    sum += term;
  }
  return sum;
}
