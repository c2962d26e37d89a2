/** Counts separate runs of at least `minRun` successive samples within [low, high]. */
export function runsAt(
  samples: Float64Array,
  low: number,
  high: number,
  minRun: number,
): { count: number; samples: number; first: number } {
  let run = 0;
  const found = { count: 0, samples: 0, first: -1 };
  for (let i = 0; i <= samples.length; i++) {
    const x = i < samples.length ? samples[i]! : NaN;
    if (x >= low && x <= high) {
      run++;
      continue;
    }
    if (run >= minRun) {
      if (found.count === 0) found.first = i - run;
      found.count++;
      found.samples += run;
    }
    run = 0;
  }
  return found;
}
