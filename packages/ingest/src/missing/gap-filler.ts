import type { ReadChannel, SampleSink } from '../types.js';

/** Longest run of missing samples that is bridged. What a longer one held, a straight line cannot tell. */
export const LONGEST_BRIDGED = 10;

interface Line {
  /** Last number, NaN before the first. */
  last: number;
  /** Missing samples that wait for the number after them. */
  waiting: number;
  /** The run is longer than may be bridged. */
  long: boolean;
  out: Float64Array;
}

/**
 * Bridges runs of up to ten missing samples by a straight line between the numbers around them; at the ends of the record
 * by the nearest number. Longer runs stay missing. Holds one block per channel.
 */
export class GapFiller implements SampleSink {
  /** Samples that were bridged. */
  bridged = 0;
  /** Runs that were too long. */
  longRuns = 0;
  /** Samples per channel that stay missing. */
  missing: number[] = [];
  private lines: Line[] = [];

  constructor(private readonly sink: SampleSink) {}

  async begin(channels: ReadChannel[]): Promise<void> {
    this.bridged = 0;
    this.longRuns = 0;
    this.missing = channels.map(() => 0);
    this.lines = channels.map(() => ({ last: NaN, waiting: 0, long: false, out: new Float64Array(0) }));
    await this.sink.begin(channels);
  }

  async write(index: number, samples: Float64Array): Promise<void> {
    const line = this.lines[index] as Line;
    if (line.waiting === 0 && samples.every((value) => !Number.isNaN(value))) {
      line.last = samples.at(-1) ?? line.last;
      line.long = false;
      await this.sink.write(index, samples);
      return;
    }
    const room = samples.length + LONGEST_BRIDGED + 1;
    if (line.out.length < room) line.out = new Float64Array(room);
    let at = 0;
    for (const value of samples) at = Number.isNaN(value) ? this.lack(index, at) : this.join(line, value, at);
    if (at > 0) await this.sink.write(index, line.out.subarray(0, at));
  }

  /** Hands on what still waits at the end of the record. */
  async finish(): Promise<void> {
    for (const [index, line] of this.lines.entries()) {
      if (line.waiting === 0) continue;
      const rest = new Float64Array(line.waiting).fill(line.last);
      if (Number.isNaN(line.last)) this.leave(index, line.waiting);
      else this.bridged += line.waiting;
      await this.sink.write(index, rest);
    }
  }

  private leave(index: number, count: number): void {
    this.missing[index] = (this.missing[index] as number) + count;
  }

  private lack(index: number, from: number): number {
    const line = this.lines[index] as Line;
    line.waiting += 1;
    if (!line.long && line.waiting <= LONGEST_BRIDGED) return from;
    if (!line.long) this.longRuns += 1;
    line.long = true;
    this.leave(index, line.waiting);
    line.out.fill(NaN, from, from + line.waiting);
    const end = from + line.waiting;
    line.waiting = 0;
    return end;
  }

  private join(line: Line, value: number, from: number): number {
    const { waiting, out } = line;
    const start = Number.isNaN(line.last) ? value : line.last;
    for (let i = 1; i <= waiting; i += 1) out[from + i - 1] = start + ((value - start) * i) / (waiting + 1);
    this.bridged += waiting;
    out[from + waiting] = value;
    line.last = value;
    line.waiting = 0;
    line.long = false;
    return from + waiting + 1;
  }
}
