import { MAX_TIMES } from './evidence.js';

/** A place where the third difference is large. */
export interface Jump {
  /** Sample behind the jump. */
  at: number;
  /** |x[n] − 3x[n−1] + 3x[n−2] − x[n−3]|, in the unit of the samples. */
  size: number;
}

/** One more than can be reported, to compare the last of them with. */
const KEPT = MAX_TIMES + 1;
/** Differences within this many samples belong to one jump. */
const CLUSTER = 4;
/** A difference that is hardly larger than the smallest kept one changes nothing in a comparison by factors. */
const WORTH_KEEPING = 1.1;

/** Keeps the largest third differences of a record, one for each place. */
export class JumpWatch {
  private found: Jump[] = [];

  /** Takes note of a difference above the last gate and returns the gate for the next ones. */
  note(at: number, size: number): number {
    const last = this.found.find((jump) => at - jump.at <= CLUSTER);
    if (last === undefined) this.found.push({ at, size });
    else if (size > last.size) Object.assign(last, { at, size });
    this.found.sort((a, b) => b.size - a.size);
    if (this.found.length > KEPT) this.found.pop();
    return this.found.length < KEPT ? 0 : WORTH_KEEPING * this.found[KEPT - 1]!.size;
  }

  /** In falling order of size. */
  list(): Jump[] {
    return this.found.map((jump) => ({ ...jump }));
  }
}
