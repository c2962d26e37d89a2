/** Bytes of four-letter name, size and body, with the pad byte after an odd size. */
export function chunk(id: string, body: Uint8Array, size = body.length): Uint8Array {
  const out = new Uint8Array(8 + body.length + (body.length % 2));
  out.set(new TextEncoder().encode(id));
  new DataView(out.buffer).setUint32(4, size, true);
  out.set(body, 8);
  return out;
}

export interface FormatFields {
  tag?: number;
  channels?: number;
  rate?: number;
  bits?: number;
  blockAlign?: number;
}

export function formatChunk({
  tag = 1,
  channels = 1,
  rate = 8000,
  bits = 16,
  blockAlign,
}: FormatFields = {}): Uint8Array {
  const view = new DataView(new ArrayBuffer(16));
  const align = blockAlign ?? channels * Math.ceil(bits / 8);
  view.setUint16(0, tag, true);
  view.setUint16(2, channels, true);
  view.setUint32(4, rate, true);
  view.setUint32(8, rate * align, true);
  view.setUint16(12, align, true);
  view.setUint16(14, bits, true);
  return chunk('fmt ', new Uint8Array(view.buffer));
}

export function join(...parts: Uint8Array[]): Uint8Array {
  const out = new Uint8Array(parts.reduce((sum, part) => sum + part.length, 0));
  let at = 0;
  for (const part of parts) {
    out.set(part, at);
    at += part.length;
  }
  return out;
}

/** A RIFF file of the chunks given. */
export function wavFile(...chunks: Uint8Array[]): Uint8Array {
  return chunk('RIFF', join(new TextEncoder().encode('WAVE'), ...chunks));
}
