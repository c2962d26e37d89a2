const NAMES: Record<string, string> = {
  IART: 'artist',
  ICMT: 'comment',
  ICOP: 'copyright',
  ICRD: 'created',
  IENG: 'engineer',
  INAM: 'title',
  IPRD: 'product',
  ISBJ: 'subject',
  ISFT: 'software',
  ISRC: 'source',
  ITCH: 'technician',
};

function text(bytes: Uint8Array): string {
  const end = bytes.indexOf(0);
  const whole = end < 0 ? bytes : bytes.subarray(0, end);
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(whole).trim();
  } catch {
    return new TextDecoder('latin1').decode(whole).trim();
  }
}

/** Texts of a LIST chunk of type INFO, by their English name or, where it has none here, by their four letters. */
export function readInfoList(body: Uint8Array): Record<string, string> {
  const entries: [string, string][] = [];
  const id = (at: number) => String.fromCharCode(...body.subarray(at, at + 4));
  if (id(0) !== 'INFO') return {};
  const view = new DataView(body.buffer, body.byteOffset, body.byteLength);
  for (let offset = 4; offset + 8 <= body.length;) {
    const size = view.getUint32(offset + 4, true);
    const start = offset + 8;
    if (start + size > body.length) break;
    const name = id(offset).replace(/[^A-Za-z0-9]/g, '');
    const value = text(body.subarray(start, start + size));
    if (name !== '' && value !== '') entries.push([NAMES[name] ?? name, value]);
    offset = start + size + (size % 2);
  }
  return Object.fromEntries(entries);
}
