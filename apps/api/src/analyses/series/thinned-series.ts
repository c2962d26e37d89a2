/** A figure over time; the arrays have the same length. */
export interface SeriesPoints {
  timeS: ArrayLike<number>;
  /** NaN where the figure does not apply. */
  value: ArrayLike<number>;
  flagged: ArrayLike<number | boolean>;
}

export interface ThinnedSeries {
  timeS: number[];
  value: (number | null)[];
  flagged: boolean[];
  thinned: boolean;
}

/**
 * Thins a series to at most `maxPoints`: of each stretch of neighbouring intervals the largest value stays, at its own
 * time, flagged where any of the stretch is.
 */
export function thinnedSeries({ timeS, value, flagged }: SeriesPoints, maxPoints: number): ThinnedSeries {
  const run = Math.max(1, Math.ceil(value.length / maxPoints));
  const points: ThinnedSeries = { timeS: [], value: [], flagged: [], thinned: run > 1 };
  for (let from = 0; from < value.length; from += run) {
    const end = Math.min(value.length, from + run);
    let largest = from;
    let isFlagged = false;
    for (let i = from; i < end; i += 1) {
      if (value[i]! > value[largest]! || (Number.isNaN(value[largest]!) && !Number.isNaN(value[i]!)))
        largest = i;
      if (flagged[i]) isFlagged = true;
    }
    const best = value[largest]!;
    points.timeS.push(timeS[largest]!);
    points.value.push(Number.isFinite(best) ? best : null);
    points.flagged.push(isFlagged);
  }
  return points;
}
