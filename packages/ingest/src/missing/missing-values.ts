import { refuse } from '../refusal.js';
import type { ReadChannel, ReadSuccess, ReadWarning, SampleSink } from '../types.js';
import { type GapFiller, LONGEST_BRIDGED } from './gap-filler.js';

/** Refuses a record for its first missing value. `what` names the place. */
export function refuseMissing(what: string, place: { line?: number; column?: number } = {}): never {
  refuse(
    'missing-values',
    `${what}, and missing values are to be refused.`,
    'Repair the record, leave out the channel, or have missing values kept or bridged.',
    place,
  );
}

/** Passes samples on and refuses the first that is missing. */
export class MissingGuard implements SampleSink {
  private names: string[] = [];
  private counts: number[] = [];

  constructor(private readonly sink: SampleSink) {}

  async begin(channels: ReadChannel[]): Promise<void> {
    this.names = channels.map(({ name }) => name);
    this.counts = channels.map(() => 0);
    await this.sink.begin(channels);
  }

  async write(index: number, samples: Float64Array): Promise<void> {
    const before = this.counts[index] as number;
    const at = samples.findIndex((value) => Number.isNaN(value));
    if (at >= 0) refuseMissing(`Sample ${before + at + 1} of channel "${this.names[index]}" is missing`);
    this.counts[index] = before + samples.length;
    await this.sink.write(index, samples);
  }
}

const KEPT = 'What is missing is kept as missing, not as zero.';

function bridgedWords({ bridged, longRuns }: GapFiller): string {
  const done = `Runs of up to ${LONGEST_BRIDGED} missing samples were bridged by a straight line, ${bridged} samples in all`;
  return longRuns === 0 ? `${done}.` : `${done}; longer runs, ${longRuns} of them, stay missing.`;
}

/** The outcome with what was done about missing values in figures and words. */
export function withTreatment(read: ReadSuccess, filler: GapFiller | null): ReadSuccess {
  const words = filler === null ? KEPT : bridgedWords(filler);
  const warnings = read.warnings.map((warning): ReadWarning =>
    warning.code === 'missing-values' ? { ...warning, message: `${warning.message} ${words}` } : warning,
  );
  return { ...read, warnings, missingValues: filler?.missing ?? read.missingValues };
}
