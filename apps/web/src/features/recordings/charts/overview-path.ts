import type { Waveform } from '@overtally/contracts';

/** Extremes of a waveform, whichever way it was delivered. */
export function extremes(waveform: Pick<Waveform, 'kind' | 'values' | 'minimum' | 'maximum'>): {
  lower: readonly (number | null)[];
  upper: readonly (number | null)[];
} {
  return waveform.kind === 'samples'
    ? { lower: waveform.values, upper: waveform.values }
    : { lower: waveform.minimum, upper: waveform.maximum };
}

/**
 * Outline of the whole record for a strip of `width` by `height`: closed shapes between maxima and minima, one for
 * each run without missing values. A flat run still shows as a line one unit high.
 */
export function overviewPath(
  waveform: Pick<Waveform, 'kind' | 'values' | 'minimum' | 'maximum'>,
  width: number,
  height: number,
): string {
  const { lower, upper } = extremes(waveform);
  const known = [...lower, ...upper].filter((value): value is number => value !== null);
  if (known.length === 0) return '';
  const low = known.reduce((a, b) => Math.min(a, b), Infinity);
  const high = known.reduce((a, b) => Math.max(a, b), -Infinity);
  const scale = high > low ? (height - 2) / (high - low) : 0;
  const y = (value: number) => (high > low ? 1 + (high - value) * scale : height / 2);
  const x = (index: number) => (upper.length > 1 ? (index / (upper.length - 1)) * width : 0);
  return runs(upper)
    .map((indices) => {
      const at = (value: number, lift: number) => (y(value) + lift).toFixed(1);
      const over = indices.map((i) => `${x(i).toFixed(1)} ${at(upper[i] ?? 0, -0.5)}`);
      const under = indices.toReversed().map((i) => `${x(i).toFixed(1)} ${at(lower[i] ?? 0, 0.5)}`);
      return `M${[...over, ...under].join('L')}Z`;
    })
    .join('');
}

/** Indices of the values that are there, one list for each run without a missing one. */
export function runs(values: readonly (number | null)[]): number[][] {
  const found: number[][] = [];
  values.forEach((value, index) => {
    if (value === null) return;
    const last = found.at(-1);
    if (last && last.at(-1) === index - 1) last.push(index);
    else found.push([index]);
  });
  return found;
}
