import type { AnalysisPart, PartResult, PartResultOf } from '../parts/part-types.js';

/** Computes some parts, in any order and at the same time if it can, and gives their results in the order of the parts. */
export type Batches<Result> = Generator<AnalysisPart[], Result, PartResult[]>;

/** Gathers parts that do not wait for one another. */
export class PartBatch {
  private readonly parts: AnalysisPart[] = [];
  private results: (PartResult | undefined)[] | null = null;

  /** Adds a part; the answer gives its result after `run`. */
  add<Part extends AnalysisPart>(part: Part): () => PartResultOf<Part['kind']> {
    const at = this.parts.push(part) - 1;
    return () => this.resultAt(at) as PartResultOf<Part['kind']>;
  }

  /** Adds a part whose result is large: it is given once, and then let go of. */
  addLarge<Part extends AnalysisPart>(part: Part): () => PartResultOf<Part['kind']> {
    const at = this.parts.push(part) - 1;
    return () => {
      const result = this.resultAt(at) as PartResultOf<Part['kind']>;
      this.results![at] = undefined;
      return result;
    };
  }

  *run(): Batches<void> {
    this.results = this.parts.length === 0 ? [] : yield this.parts;
  }

  private resultAt(at: number): PartResult {
    if (this.results === null) throw new Error('The results of a batch were asked for before it was run');
    const result = this.results[at];
    if (result === undefined) throw new Error('A result that is given once was asked for again');
    return result;
  }
}
