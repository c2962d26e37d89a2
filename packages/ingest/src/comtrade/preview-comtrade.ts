import { splitLines } from '../csv/lines.js';
import {
  PREVIEW_LINES,
  PREVIEW_ROWS,
  refuseTooShort,
  withProblem,
  type PreviewHead,
} from '../preview-problem.js';
import { catchRefusal } from '../refusal.js';
import type { PreviewArguments, Problem } from '../types.js';
import { type CffHead, readCffHead } from './cff.js';
import { comtradeChannels, describeComtrade, recordReader } from './layout.js';
import { WINDOW_BYTES } from './records.js';
import { Stamps } from './stamps.js';

interface FirstRecords {
  rows: (number | null)[][];
  rateHz: number | null;
}

function firstRecords(head: Uint8Array, cff: CffHead, complete: boolean): FirstRecords {
  const reader = recordReader(
    cff,
    cff.config.analog.map((_, index) => index),
  );
  const end = Math.min(head.length, cff.dataOffset + Math.min(WINDOW_BYTES, cff.dataBytes ?? Infinity));
  reader.read(head.subarray(cff.dataOffset, end), complete && end === head.length);
  const stamps = new Stamps(cff.config.secondsPerStamp, null);
  stamps.take(reader.stamps, reader.count, 0);
  const rows = Array.from({ length: Math.min(PREVIEW_ROWS, reader.count) }, (_, i) =>
    reader.values.map((values) => (Number.isNaN(values[i]) ? null : (values[i] as number))),
  );
  return { rows, rateHz: stamps.sampleRateHz() };
}

/** Says how a single-file COMTRADE record would be read, from its beginning. */
export function previewComtrade(head: Uint8Array, complete: boolean, args: PreviewArguments): PreviewHead {
  const options = args.options ?? {};
  return catchRefusal(
    () => {
      const cff = readCffHead(head, complete);
      if (typeof cff === 'number') refuseTooShort('the COMTRADE file');
      comtradeChannels(cff, options);
      const { rows, rateHz } = firstRecords(head, cff, complete);
      const sampleRateHz = options.sampleRateHz ?? cff.config.sampleRateHz ?? rateHz;
      const text = new TextDecoder('latin1').decode(head.subarray(0, cff.dataOffset));
      const problem: Problem | null =
        sampleRateHz !== null
          ? null
          : {
              code: 'needs-sample-rate',
              message: 'The COMTRADE record states no sampling rate, and its first time stamps tell none.',
              cure: 'Give the sample rate in hertz.',
            };
      return {
        layout: describeComtrade(cff),
        lines: splitLines(text).slice(0, PREVIEW_LINES),
        rows,
        sampleRateHz,
        problem,
        needs: problem === null ? [] : ['sampleRateHz'],
        clockColumns: [],
      };
    },
    (problem) => withProblem('comtrade', [], problem),
  );
}
