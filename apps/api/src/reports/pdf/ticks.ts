/** Round numbers (1, 2 or 5 times a power of ten apart) from at or below `low` to at or above `high`. */
export function niceTicks(low: number, high: number, about: number): number[] {
  const range = high - low || Math.abs(high) || 1;
  const power = 10 ** Math.floor(Math.log10(range / about));
  const step = [1, 2, 5, 10].map((factor) => factor * power).find((size) => range / size <= about)!;
  const first = Math.floor(low / step + 1e-9);
  const last = Math.ceil(high / step - 1e-9);
  return Array.from({ length: last - first + 1 }, (_, index) =>
    Number(((first + index) * step).toPrecision(12)),
  );
}
