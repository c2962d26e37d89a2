import { decodeText, guessEncoding } from './csv/encoding.js';
import type { PreviewHead } from './preview-problem.js';
import { readRecording } from './read-recording.js';
import type {
  HeadSamples,
  PreviewArguments,
  PreviewOutcome,
  PreviewSignal,
  ReadChannel,
  SampleSink,
} from './types.js';

const MOST_SIGNALS = 8;
const MOST_VALUES = 2000;
/** Time that the values of a signal reach over where there are samples enough: four cycles at 50 Hz. */
const SPAN_S = 0.08;
const LF = 10;

/** What is a problem of a beginning alone: too little of it is there. */
const OF_THE_CUT = ['no-samples', 'too-few-samples', 'needs-sample-rate'];

/** The bytes without a last line that may be cut; tables as UTF-8, so that a cut leaves whole characters. */
function wholeLines(head: Uint8Array, { layout }: PreviewHead): Uint8Array {
  if (layout.format === 'csv') {
    const { encoding, bomBytes } = guessEncoding(head);
    const text = decodeText(head.subarray(bomBytes), encoding);
    const end = Math.max(text.lastIndexOf('\n'), text.lastIndexOf('\r'));
    return new TextEncoder().encode(text.slice(0, end + 1));
  }
  const isText = layout.format === 'comtrade' && layout.sampleFormat === 'ASCII';
  return isText ? head.subarray(0, head.lastIndexOf(LF) + 1) : head;
}

// eslint-disable-next-line @typescript-eslint/require-await
async function* only(bytes: Uint8Array): AsyncGenerator<Uint8Array> {
  yield bytes;
}

/** Keeps the scaled samples of the first channels. */
class Keeper implements SampleSink {
  private channels: ReadChannel[] = [];
  private blocks: Float64Array[][] = [];

  begin(channels: ReadChannel[]): void {
    this.channels = channels.slice(0, MOST_SIGNALS);
    this.blocks = this.channels.map(() => []);
  }

  write(index: number, samples: Float64Array): void {
    const channel = this.channels[index];
    if (channel !== undefined)
      this.blocks[index]?.push(samples.map((raw) => raw * channel.gain + channel.offset));
  }

  samples(): HeadSamples[] {
    return this.channels.map(({ column, name, quantity, unit }, i) => {
      const blocks = this.blocks[i] ?? [];
      const samples = new Float64Array(blocks.reduce((sum, { length }) => sum + length, 0));
      let at = 0;
      for (const block of blocks) {
        samples.set(block, at);
        at += block.length;
      }
      return { column, name, quantity, unit, samples };
    });
  }
}

const orNull = (value: number | undefined) => (Number.isFinite(value) ? (value as number) : null);

/** Lowest and highest sample of a bin in the order they occur. */
function ends(samples: Float64Array, from: number, to: number): [number | null, number | null] {
  let low = -1;
  let high = -1;
  for (let i = from; i < to; i += 1) {
    const value = samples[i] as number;
    if (Number.isNaN(value)) continue;
    if (low < 0 || value < (samples[low] as number)) low = i;
    if (high < 0 || value > (samples[high] as number)) high = i;
  }
  const [first, second] = low < high ? [low, high] : [high, low];
  return [orNull(samples[first]), orNull(samples[second])];
}

function signalOf({ samples, ...channel }: HeadSamples, rateHz: number, startS: number): PreviewSignal {
  const wanted = Math.min(samples.length, Math.ceil(SPAN_S * rateHz));
  const stride = Math.ceil(wanted / MOST_VALUES);
  const values: (number | null)[] = [];
  if (stride <= 1) values.push(...Array.from(samples.subarray(0, MOST_VALUES), orNull));
  // A bin makes two values, so it is two steps long.
  else
    for (let from = 0; from + 2 * stride <= wanted; from += 2 * stride)
      values.push(...ends(samples, from, from + 2 * stride));
  return { ...channel, startS, stepS: Math.max(1, stride) / rateHz, values };
}

/** Reads the beginning of a file as the whole would be read, and shows the first of its channels. */
export async function readBeginning(
  head: Uint8Array,
  complete: boolean,
  seen: PreviewHead,
  args: PreviewArguments,
): Promise<Pick<PreviewOutcome, 'problem' | 'signals' | 'headSamples'>> {
  const bytes = complete ? head : wholeLines(head, seen);
  const sink = new Keeper();
  const outcome = await readRecording(() => only(bytes), { ...args, sink });
  if (!outcome.ok) {
    const isOfTheCut = !complete && OF_THE_CUT.includes(outcome.problem.code);
    return { problem: isOfTheCut ? null : outcome.problem, signals: [], headSamples: [] };
  }
  const headSamples = sink.samples();
  const { sampleRateHz, startTimeS } = outcome;
  const signals = headSamples.map((channel) => signalOf(channel, sampleRateHz, startTimeS ?? 0));
  return { problem: null, signals, headSamples };
}
