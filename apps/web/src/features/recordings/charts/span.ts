/** A part of the record, in seconds from its first sample. */
export interface Span {
  fromS: number;
  toS: number;
}

/** Cycles of the fundamental shown when a sheet is opened. */
const cyclesShown = 4;
/** A view without a fundamental begins with this share of the record. */
const shareShown = 0.1;

/** Moves and cuts `span` so that it lies in the record and is at least `leastS` long. */
export function clampSpan(span: Span, durationS: number, leastS: number): Span {
  const length = Math.min(durationS, Math.max(leastS, span.toS - span.fromS));
  const fromS = Math.min(Math.max(0, span.fromS), durationS - length);
  return { fromS, toS: fromS + length };
}

/** Four cycles in the middle of the record; a tenth of it when it has no fundamental. */
export function firstView(durationS: number, fundamentalHz: number | null): Span {
  const length = Math.min(durationS, fundamentalHz ? cyclesShown / fundamentalHz : durationS * shareShown);
  const fromS = (durationS - length) / 2;
  return { fromS, toS: fromS + length };
}

export const moved = ({ fromS, toS }: Span, byS: number): Span => ({ fromS: fromS + byS, toS: toS + byS });

/** Longer (factor above 1) or shorter about its middle. */
export function resized({ fromS, toS }: Span, factor: number): Span {
  const middle = (fromS + toS) / 2;
  const half = ((toS - fromS) / 2) * factor;
  return { fromS: middle - half, toS: middle + half };
}

/** Unit that suits a span, with the factor from seconds. */
export function timeUnit(lengthS: number): { unit: 's' | 'ms' | 'µs'; factor: number } {
  if (lengthS >= 2) return { unit: 's', factor: 1 };
  if (lengthS >= 2e-3) return { unit: 'ms', factor: 1e3 };
  return { unit: 'µs', factor: 1e6 };
}
