import { PREVIEW_ROWS, type PreviewHead, refuseTooShort, withProblem } from '../preview-problem.js';
import { catchRefusal } from '../refusal.js';
import type { PreviewArguments } from '../types.js';
import { readWavHeader } from './header.js';
import { describeWav, wavChannels } from './layout.js';
import { decoderOf } from './samples.js';

/** Says how a WAV file would be read, from its beginning. */
export function previewWav(head: Uint8Array, complete: boolean, args: PreviewArguments): PreviewHead {
  return catchRefusal(
    () => {
      const header = readWavHeader(head, complete);
      if (typeof header === 'number') {
        refuseTooShort('the WAV file');
      }
      const { format, dataOffset, dataBytes } = header;
      wavChannels(header, args.options ?? {});
      const stride = format.bytesPerSample * format.channelCount;
      const available = Math.min(head.length - dataOffset, dataBytes ?? Infinity);
      const frames = Math.max(0, Math.min(PREVIEW_ROWS, Math.floor(available / stride)));
      const decode = decoderOf(format);
      const columns = Array.from({ length: format.channelCount }, (_, channel) => {
        const samples = new Float64Array(frames);
        decode(head, dataOffset + channel * format.bytesPerSample, stride, frames, samples);
        return samples;
      });
      const rows = Array.from({ length: frames }, (_, i) => columns.map((samples) => samples[i] as number));
      const sampleRateHz = args.options?.sampleRateHz ?? format.sampleRateHz;
      const layout = describeWav(header);
      return { layout, lines: [], rows, sampleRateHz, problem: null, needs: [], clockColumns: [] };
    },
    (problem) => withProblem('wav', [], problem),
  );
}
