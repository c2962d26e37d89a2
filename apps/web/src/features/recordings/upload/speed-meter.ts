/** Seconds over which a speed is averaged. */
const spanS = 5;

/** How fast an upload goes, from what has been sent when. */
export class SpeedMeter {
  private points: { timeS: number; bytes: number }[] = [];

  /** Takes a point of the progress and gives the mean speed of the last seconds in B/s; null before there is one. */
  take(timeS: number, bytes: number): number | null {
    this.points = [...this.points.filter((point) => point.timeS >= timeS - spanS), { timeS, bytes }];
    const first = this.points[0];
    if (!first || timeS - first.timeS < 0.5) return null;
    return Math.max(0, (bytes - first.bytes) / (timeS - first.timeS));
  }
}
