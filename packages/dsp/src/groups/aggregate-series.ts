export interface AggregatedSeries {
  values: Float64Array;
  flagged: Uint8Array;
}

/** Windows per 150/180-cycle interval. */
export const WINDOWS_PER_3_S = 15;
/** Windows per 10 min interval. */
export const WINDOWS_PER_10_MIN = 3000;

/**
 * Aggregation of IEC 61000-4-30:2015, 4.4 and 4.5: the square root of the arithmetic mean of the squared values of
 * `factor` successive intervals (15 windows of 10/12 cycles give 150/180 cycles, 3000 give 10 min). An interval that holds
 * a flagged window is flagged (4.7). A last incomplete interval is dropped. The intervals are counted from the first
 * sample; the standard starts them anew on the tick of the 10 min clock, which a record does not tell.
 *
 * @param flagged 1 where a value is flagged
 * @throws RangeError for a factor that is no positive whole number
 */
export function aggregateSeries(
  values: ArrayLike<number>,
  flagged: ArrayLike<number>,
  factor: number,
): AggregatedSeries {
  if (!Number.isInteger(factor) || factor < 1) {
    throw new RangeError(`Intervals must hold a positive whole number of windows, got ${factor}`);
  }
  const count = Math.floor(values.length / factor);
  const out = { values: new Float64Array(count), flagged: new Uint8Array(count) };
  for (let i = 0; i < count; i++) {
    let squares = 0;
    for (let j = i * factor; j < (i + 1) * factor; j++) {
      squares += values[j]! ** 2;
      if (flagged[j] === 1) out.flagged[i] = 1;
    }
    out.values[i] = Math.sqrt(squares / factor);
  }
  return out;
}
