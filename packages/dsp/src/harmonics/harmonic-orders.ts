/**
 * The highest order that a record can represent: h·f0 stays below half the sample rate by more than half a line of
 * the record, so that its two quadrature components can still be told apart.
 */
export function highestOrder(
  fundamentalHz: number,
  sampleRateHz: number,
  sampleCount: number,
  maxOrder: number,
): number {
  const limitHz = sampleRateHz / 2 - (0.6 * sampleRateHz) / sampleCount;
  return Math.max(0, Math.min(maxOrder, Math.floor(limitHz / fundamentalHz)));
}

/** Angles in radians per sample of DC and the orders 1..count of a fundamental. */
export function harmonicAngles(fundamentalHz: number, sampleRateHz: number, count: number): Float64Array {
  const angle = (2 * Math.PI * fundamentalHz) / sampleRateHz;
  return Float64Array.from({ length: count + 1 }, (_, order) => order * angle);
}
