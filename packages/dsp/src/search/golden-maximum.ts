const GOLDEN = (Math.sqrt(5) - 1) / 2;
/** Each step leaves 0.618 of the interval: 60 steps reach the precision with which a maximum can be told. */
const STEPS = 60;

/** Where a function with one maximum in an interval has it, by golden section (J. Kiefer, Proc. Am. Math. Soc. 4, 1953). */
export function goldenMaximum(f: (x: number) => number, from: number, to: number): number {
  let [a, b] = [from, to];
  let inner = b - GOLDEN * (b - a);
  let outer = a + GOLDEN * (b - a);
  let [valueInner, valueOuter] = [f(inner), f(outer)];
  for (let i = 0; i < STEPS; i++) {
    if (valueInner > valueOuter) {
      [b, outer, valueOuter] = [outer, inner, valueInner];
      inner = b - GOLDEN * (b - a);
      valueInner = f(inner);
    } else {
      [a, inner, valueInner] = [inner, outer, valueOuter];
      outer = a + GOLDEN * (b - a);
      valueOuter = f(outer);
    }
  }
  return (a + b) / 2;
}
