import { ByteSource } from './byte-source.js';
import { refuseHalfRecord } from './comtrade/alone.js';
import { isCff } from './comtrade/cff.js';
import { readComtrade } from './comtrade/read-comtrade.js';
import { readCsv } from './csv/read-csv.js';
import { refuseKnownBinary } from './known-binary.js';
import { GapFiller } from './missing/gap-filler.js';
import { MissingGuard, withTreatment } from './missing/missing-values.js';
import { isNpy } from './npy/header.js';
import { readNpy } from './npy/read-npy.js';
import { refuse, Refusal } from './refusal.js';
import { type EvenGrid, UnevenStamps } from './resampling/even-grid.js';
import { TimeRule } from './resampling/time-rule.js';
import type { ReadArguments, ReadOutcome, ReadSuccess, RecordingSource, SampleSink } from './types.js';
import { isWav } from './wav/header.js';
import { readWav } from './wav/read-wav.js';

/** Bytes that tell one format from another. */
const HEAD_BYTES = 4096;

interface Pass {
  args: ReadArguments;
  sink: SampleSink;
  time: TimeRule;
}

async function read(source: ByteSource, { args, sink, time }: Pass): Promise<ReadSuccess> {
  const { fileName, options = {} } = args;
  const head = await source.peek(HEAD_BYTES);
  if (head.length === 0) {
    refuse(
      'empty-file',
      `"${fileName}" is empty: it holds 0 bytes.`,
      'Copy the file from the instrument again.',
    );
  }
  if (isWav(head)) return readWav(source, { fileName, sink, options });
  if (isNpy(head)) return readNpy(source, { sink, options });
  if (isCff(head)) return readComtrade(source, { sink, options, time });
  refuseKnownBinary(head, fileName);
  refuseHalfRecord(head, fileName, options);
  return readCsv(source, { fileName, sink, options, time });
}

async function readOnce(
  source: RecordingSource,
  args: ReadArguments,
  grid: EvenGrid | null,
): Promise<ReadSuccess> {
  const { options = {} } = args;
  const filler = options.missingValues === 'interpolate' ? new GapFiller(args.sink) : null;
  const guard = options.missingValues === 'refuse' ? new MissingGuard(args.sink) : null;
  const canReadAgain = typeof source === 'function';
  const bytes = new ByteSource(canReadAgain ? await source() : source, args.onProgress, args.signal);
  try {
    const time = new TimeRule(options, grid, canReadAgain);
    const success = await read(bytes, { args, sink: filler ?? guard ?? args.sink, time });
    await filler?.finish();
    return withTreatment(success, filler);
  } finally {
    await bytes.close();
  }
}

/** Reads once more, to resample, where the stamps of a first reading turn out uneven. */
async function readTwice(source: RecordingSource, args: ReadArguments): Promise<ReadSuccess> {
  try {
    return await readOnce(source, args, null);
  } catch (error) {
    if (error instanceof UnevenStamps) return readOnce(source, args, error.grid);
    throw error;
  }
}

/**
 * Reads a recording from its bytes and hands the samples to `sink` block by block, in flat memory.
 *
 * The content decides the format: RIFF or RF64 is read as WAV, the magic string of .npy as an
 * array, sections of file types as a COMTRADE record, other text as a table of numbers. Bad input gives
 * `{ ok: false, problem }`; whatever the sink received until then is to be thrown away. Rejects only with the abort
 * reason of `signal`, with what the source or the sink throw, or on a programming error.
 *
 * Sample rate of a table in Hz: (n - 1) / (t_last - t_first) of its time column; where rows are missing and the other
 * intervals are even, that of the regular intervals. Time running backwards, and one time stamp with different values,
 * are refused; exact copies of a row are dropped; missing cells are NaN and counted.
 *
 * Time stamps that are off by more than 5 % of their interval are resampled at the mean rate by piecewise cubic
 * interpolation, unless the options say otherwise, give the sample rate, or the digits of the stamps explain it. That
 * takes a second reading: the whole of a file tells its mean rate. It needs a source that can be opened again; one that
 * cannot is taken as even, with a warning. Pauses of more than two intervals stay missing.
 * @throws TypeError where resampling is asked for and the source cannot be opened again
 */
export async function readRecording(source: RecordingSource, args: ReadArguments): Promise<ReadOutcome> {
  args.signal?.throwIfAborted();
  if (args.options?.unevenTime === 'resample' && typeof source !== 'function')
    throw new TypeError('resampling reads a file twice: give a function that opens it');
  try {
    return await readTwice(source, args);
  } catch (error) {
    if (error instanceof Refusal) return { ok: false, problem: error.problem };
    throw error;
  }
}
