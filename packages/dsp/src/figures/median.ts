/** Lower median, found by partial sorting (C. A. R. Hoare, "Algorithm 65: Find", Comm. ACM 4, 1961); NaN without values. */
export function median(values: ArrayLike<number>): number {
  const work = Float64Array.from(values);
  const wanted = (work.length - 1) >> 1;
  let low = 0;
  let high = work.length - 1;
  while (low < high) {
    const pivot = work[(low + high) >> 1]!;
    let i = low;
    let j = high;
    while (i <= j) {
      while (work[i]! < pivot) i++;
      while (work[j]! > pivot) j--;
      if (i <= j) {
        const held = work[i]!;
        work[i] = work[j]!;
        work[j] = held;
        i++;
        j--;
      }
    }
    if (wanted <= j) high = j;
    else if (wanted >= i) low = i;
    else break;
  }
  return work[wanted] ?? NaN;
}
