import { PREVIEW_ROWS, refuseTooShort, withProblem, type PreviewHead } from '../preview-problem.js';
import { catchRefusal } from '../refusal.js';
import type { PreviewArguments, Problem } from '../types.js';
import { type NpyHeader, readNpyHeader } from './header.js';
import { describeNpy, npyChannels, npySampleRateHz } from './layout.js';
import { decoderOf } from './samples.js';

/** The first frames; a channel whose samples lie behind the bytes at hand is blank. */
function firstRows(head: Uint8Array, header: NpyHeader): (number | null)[][] {
  const { dataOffset, channelCount, frameCount, planar, type } = header;
  const decode = decoderOf(type);
  const step = planar ? type.bytes : type.bytes * channelCount;
  const columns = Array.from({ length: channelCount }, (_, channel) => {
    const from = dataOffset + channel * type.bytes * (planar ? frameCount : 1);
    const there = Math.floor((head.length - from - type.bytes) / step) + 1;
    const samples = new Float64Array(Math.max(0, Math.min(PREVIEW_ROWS, frameCount, there)));
    decode(head, from, step, samples.length, samples);
    return samples;
  });
  const rowCount = columns[0]?.length ?? 0;
  return Array.from({ length: rowCount }, (_, i) =>
    columns.map((samples) => {
      const value = samples[i];
      return value !== undefined && Number.isFinite(value) ? value : null;
    }),
  );
}

/** Says how an .npy file would be read, from its beginning. */
export function previewNpy(head: Uint8Array, complete: boolean, args: PreviewArguments): PreviewHead {
  const options = args.options ?? {};
  return catchRefusal(
    () => {
      const header = readNpyHeader(head, complete);
      if (typeof header === 'number') refuseTooShort('the .npy file');
      npyChannels(header, options);
      const problem = catchRefusal<Problem | null>(
        () => {
          npySampleRateHz(options);
          return null;
        },
        (found) => found,
      );
      return {
        layout: describeNpy(header),
        lines: [],
        rows: firstRows(head, header),
        sampleRateHz: options.sampleRateHz ?? null,
        problem,
        needs: problem === null ? [] : ['sampleRateHz'],
        clockColumns: [],
      };
    },
    (problem) => withProblem('npy', [], problem),
  );
}
