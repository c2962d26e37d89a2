import { ByteSource } from './byte-source.js';
import { refuseHalfRecord } from './comtrade/alone.js';
import { isCff } from './comtrade/cff.js';
import { readComtrade } from './comtrade/read-comtrade.js';
import { readCsv } from './csv/read-csv.js';
import { refuseKnownBinary } from './known-binary.js';
import { isNpy } from './npy/header.js';
import { readNpy } from './npy/read-npy.js';
import { refuse, Refusal } from './refusal.js';
import type { ReadArguments, ReadOutcome, ReadSuccess, RecordingSource } from './types.js';
import { isWav } from './wav/header.js';
import { readWav } from './wav/read-wav.js';

/** Bytes that tell one format from another. */
const HEAD_BYTES = 4096;

async function read(source: ByteSource, args: ReadArguments): Promise<ReadSuccess> {
  const { fileName, sink, options = {} } = args;
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
  if (isCff(head)) return readComtrade(source, { sink, options });
  refuseKnownBinary(head, fileName);
  refuseHalfRecord(head, fileName, options);
  return readCsv(source, { fileName, sink, options });
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
 */
export async function readRecording(source: RecordingSource, args: ReadArguments): Promise<ReadOutcome> {
  args.signal?.throwIfAborted();
  const opened = typeof source === 'function' ? await source() : source;
  const bytes = new ByteSource(opened, args.onProgress, args.signal);
  try {
    return await read(bytes, args);
  } catch (error) {
    if (error instanceof Refusal) return { ok: false, problem: error.problem };
    throw error;
  } finally {
    await bytes.close();
  }
}
