export type TextEncoding = 'utf-8' | 'utf-16le' | 'utf-16be' | 'latin1';

/** Encoding of a text and the length of its byte order mark. */
export interface EncodingGuess {
  encoding: TextEncoding;
  bomBytes: number;
}

function zeroShare(head: Uint8Array, parity: 0 | 1): number {
  let zeros = 0;
  let count = 0;
  for (let i = parity; i < head.length; i += 2) {
    count += 1;
    if (head[i] === 0) zeros += 1;
  }
  return count === 0 ? 0 : zeros / count;
}

function isUtf8(head: Uint8Array): boolean {
  try {
    new TextDecoder('utf-8', { fatal: true }).decode(head, { stream: true });
    return true;
  } catch {
    return false;
  }
}

/** Encoding by byte order mark; without one by the zero bytes of UTF-16, then by whether it is valid UTF-8. */
export function guessEncoding(head: Uint8Array): EncodingGuess {
  if (head[0] === 0xef && head[1] === 0xbb && head[2] === 0xbf) return { encoding: 'utf-8', bomBytes: 3 };
  if (head[0] === 0xff && head[1] === 0xfe) return { encoding: 'utf-16le', bomBytes: 2 };
  if (head[0] === 0xfe && head[1] === 0xff) return { encoding: 'utf-16be', bomBytes: 2 };
  if (head.length >= 4 && zeroShare(head, 1) > 0.8 && zeroShare(head, 0) < 0.2) {
    return { encoding: 'utf-16le', bomBytes: 0 };
  }
  if (head.length >= 4 && zeroShare(head, 0) > 0.8 && zeroShare(head, 1) < 0.2) {
    return { encoding: 'utf-16be', bomBytes: 0 };
  }
  return { encoding: isUtf8(head) ? 'utf-8' : 'latin1', bomBytes: 0 };
}

/** Text of `bytes`, which hold whole characters apart from the last. */
export function decodeText(bytes: Uint8Array, encoding: TextEncoding): string {
  return new TextDecoder(encoding).decode(bytes, { stream: true });
}

/** `text` without the control characters with which some instruments pad their cells; tab and line ends stay. */
export function withoutControls(text: string): string {
  // eslint-disable-next-line no-control-regex
  return text.replace(/[\u0000-\u0008\u000b\u000e-\u001f\u007f]/g, '');
}

/**
 * True when text holds characters that no table holds: control characters other than tab, line ends, form feed and
 * the end-of-file mark of old systems.
 */
export function looksBinary(text: string): boolean {
  // eslint-disable-next-line no-control-regex
  const controls = text.match(/[\u0000-\u0008\u000e-\u0019\u001b-\u001f]/g)?.length ?? 0;
  return controls > text.length / 1000;
}

/** Turns a stream of UTF-16 bytes into UTF-8, so that one byte-level parser serves all encodings. */
export async function* utf16ToUtf8(
  source: AsyncIterable<Uint8Array>,
  encoding: TextEncoding,
): AsyncGenerator<Uint8Array> {
  const decoder = new TextDecoder(encoding, { ignoreBOM: false });
  const encoder = new TextEncoder();
  for await (const chunk of source) yield encoder.encode(decoder.decode(chunk, { stream: true }));
  yield encoder.encode(decoder.decode());
}
