import type { ReadOutcome } from '@overtally/ingest';
import type { ReferenceCase } from '../case-file.js';
import { CannotServe, type Quantities } from '../quantities.js';
import { readFileOf } from '../read-record.js';

/** Family 9: whether a file is accepted, and what was read from it, as it stands in the file. */
export async function filesFromInstruments(folder: string, { files }: ReferenceCase): Promise<Quantities> {
  const [file] = files;
  if (file === undefined) throw new CannotServe('the case has no file');
  // Nothing but the name is taken from the description: the reader has to find out all the rest.
  const { outcome, samples } = await readFileOf(folder, file.name, {});
  return outcome.ok ? accepted(outcome, samples) : refused(outcome);
}

function accepted(outcome: Extract<ReadOutcome, { ok: true }>, samples: Float64Array[]): Quantities {
  return {
    outcome: 'accepted',
    sample_rate_hz: outcome.sampleRateHz,
    channels: outcome.channels.length,
    samples: outcome.sampleCount,
    first: samples.map((values) => values[0]),
    last: samples.map((values) => values.at(-1)),
    missing_values: outcome.missingValues.reduce((sum, count) => sum + count, 0),
    warnings: outcome.warnings.map(({ code }) => code),
  };
}

function refused({ problem }: Extract<ReadOutcome, { ok: false }>): Quantities {
  const outcome = problem.code === 'needs-sample-rate' ? problem.code : 'refused';
  return { outcome, message: `${problem.message} ${problem.cure}` };
}
