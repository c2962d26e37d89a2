import { isCff } from './comtrade/cff.js';
import { previewComtrade } from './comtrade/preview-comtrade.js';
import { previewCsv } from './csv/preview-csv.js';
import { isNpy } from './npy/header.js';
import { previewNpy } from './npy/preview-npy.js';
import { type PreviewHead, withProblem } from './preview-problem.js';
import { readBeginning } from './read-beginning.js';
import type { PreviewArguments, PreviewOutcome } from './types.js';
import { isWav } from './wav/header.js';
import { previewWav } from './wav/preview-wav.js';

function previewHead(head: Uint8Array, complete: boolean, args: PreviewArguments): PreviewHead {
  if (head.length === 0) {
    const message = `"${args.fileName}" is empty: it holds 0 bytes.`;
    const cure = 'Copy the file from the instrument again.';
    return withProblem('csv', [], { code: 'empty-file', message, cure });
  }
  if (isWav(head)) return previewWav(head, complete, args);
  if (isNpy(head)) return previewNpy(head, complete, args);
  if (isCff(head)) return previewComtrade(head, complete, args);
  return previewCsv(head, complete, args);
}

/**
 * Says how a file would be read, from its beginning (128 KiB tell as much as the reader itself looks at), and reads that
 * beginning under the options. A problem that shows only there, such as a cell with thousands separators, is told like any other.
 * @param head the first bytes of the file
 * @param args `sizeBytes` is the size of the whole file; without it `head` is taken as the beginning of a longer one
 *   unless it is empty
 */
export async function previewRecording(head: Uint8Array, args: PreviewArguments): Promise<PreviewOutcome> {
  const complete = args.sizeBytes !== undefined && args.sizeBytes <= head.length;
  const seen = previewHead(head, complete, args);
  if (seen.problem !== null) return { ...seen, signals: [], headSamples: [] };
  const { problem, ...beginning } = await readBeginning(head, complete, seen, args);
  return { ...seen, problem, ...beginning };
}
