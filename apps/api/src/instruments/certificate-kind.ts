/** A kind of file that is taken as a certificate. */
export interface CertificateKind {
  ending: string;
  contentType: string;
}

interface Marked extends CertificateKind {
  /** The bytes it begins with. */
  mark: readonly number[];
}

/** First bytes by ISO 32000-1, 7.5.2; ISO/IEC 15948 (PNG), 5.2; ISO/IEC 10918-1 (JPEG), B.1.1.3 and B.2.1. */
const kinds: readonly Marked[] = [
  { ending: 'pdf', contentType: 'application/pdf', mark: [0x25, 0x50, 0x44, 0x46, 0x2d] },
  {
    ending: 'png',
    contentType: 'image/png',
    mark: [0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a],
  },
  { ending: 'jpg', contentType: 'image/jpeg', mark: [0xff, 0xd8, 0xff] },
];

/** What a file is by its first bytes; undefined where it is none of the kinds taken. */
export function certificateKind(bytes: Uint8Array): CertificateKind | undefined {
  return kinds.find(({ mark }) => mark.every((byte, i) => bytes[i] === byte));
}

/** The media type of a stored certificate by the ending of its key. */
export function contentTypeOf(key: string): string {
  return kinds.find(({ ending }) => key.endsWith(`.${ending}`))?.contentType ?? 'application/octet-stream';
}
