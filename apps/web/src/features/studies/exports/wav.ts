export interface WavInfo {
  title: string;
  /** Scaling, unit, where the wave comes from. */
  comment: string;
  /** Name of the program, for ISFT. */
  software: string;
}

const ascii = (text: string) =>
  Uint8Array.from(
    text.replace(
      /[^\u0020-\u007e]/g,
      (c) => ({ µ: 'u', '·': '.', '−': '-', '–': '-', '°': ' deg' })[c] ?? '?',
    ),
    (c) => c.charCodeAt(0),
  );

/**
 * One channel as a WAV file (RIFF; Microsoft Multimedia Programming Interface 1.0 and Multiple Channel Audio Data):
 * 32-bit float or 16-bit PCM with a LIST INFO chunk. Samples lie within ±1.
 *
 * @param sampleRateHz is rounded to a whole number, as the format asks
 */
export function wavFile(
  samples: ArrayLike<number>,
  sampleRateHz: number,
  encoding: 'float32' | 'int16',
  info: WavInfo,
): Uint8Array<ArrayBuffer> {
  const isFloat = encoding === 'float32';
  const bytes = isFloat ? 4 : 2;
  const rate = Math.round(sampleRateHz);
  const format = new DataView(new ArrayBuffer(isFloat ? 18 : 16));
  format.setUint16(0, isFloat ? 3 : 1, true);
  format.setUint16(2, 1, true);
  format.setUint32(4, rate, true);
  format.setUint32(8, rate * bytes, true);
  format.setUint16(12, bytes, true);
  format.setUint16(14, 8 * bytes, true);
  const data = new DataView(new ArrayBuffer(samples.length * bytes));
  for (let i = 0; i < samples.length; i++) {
    const value = samples[i]!;
    if (isFloat) data.setFloat32(4 * i, value, true);
    else data.setInt16(2 * i, Math.round(Math.max(-1, Math.min(1, value)) * 32767), true);
  }
  const count = new DataView(new ArrayBuffer(4));
  count.setUint32(0, samples.length, true);
  const chunks = [
    chunk('fmt ', bytesOf(format)),
    ...(isFloat ? [chunk('fact', bytesOf(count))] : []),
    chunk(
      'LIST',
      joined([
        ascii('INFO'),
        ...(
          [
            ['INAM', info.title],
            ['ICMT', info.comment],
            ['ISFT', info.software],
          ] as const
        ).map(([id, text]) => chunk(id, joined([ascii(text), new Uint8Array(1)]))),
      ]),
    ),
    chunk('data', bytesOf(data)),
  ];
  return chunk('RIFF', joined([ascii('WAVE'), ...chunks]));
}

const bytesOf = (view: DataView<ArrayBuffer>) => new Uint8Array(view.buffer);

/** Name, length and content, padded to an even length. */
function chunk(id: string, content: Uint8Array): Uint8Array<ArrayBuffer> {
  const head = new DataView(new ArrayBuffer(8));
  for (let i = 0; i < 4; i++) head.setUint8(i, id.charCodeAt(i));
  head.setUint32(4, content.length, true);
  return joined([bytesOf(head), content, new Uint8Array(content.length % 2)]);
}

function joined(parts: readonly Uint8Array[]): Uint8Array<ArrayBuffer> {
  const whole = new Uint8Array(parts.reduce((length, part) => length + part.length, 0));
  let at = 0;
  for (const part of parts) {
    whole.set(part, at);
    at += part.length;
  }
  return whole;
}
