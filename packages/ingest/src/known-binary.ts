import { refuse } from './refusal.js';

const KNOWN: { magic: string; what: string; cure: string }[] = [
  {
    magic: 'PK\u0003\u0004',
    what: 'a spreadsheet or ZIP archive',
    cure: 'Save the sheet as CSV, or unpack the archive.',
  },
  {
    magic: '\u00d0\u00cf\u0011\u00e0',
    what: 'a spreadsheet of an old binary format',
    cure: 'Save the sheet as CSV.',
  },
  { magic: '%PDF', what: 'a PDF document', cure: 'Upload the record itself, such as a CSV or WAV file.' },
  { magic: '\u0089PNG', what: 'a picture', cure: 'Upload the record itself, such as a CSV or WAV file.' },
  {
    magic: '\u00ff\u00d8\u00ff',
    what: 'a picture',
    cure: 'Upload the record itself, such as a CSV or WAV file.',
  },
  { magic: 'fLaC', what: 'FLAC compressed audio', cure: 'Decode it to WAV; nothing is lost by that.' },
  {
    magic: 'OggS',
    what: 'Ogg compressed audio',
    cure: 'Record as WAV: lossy compression changes the spectrum.',
  },
  {
    magic: 'ID3',
    what: 'MP3 compressed audio',
    cure: 'Record as WAV: lossy compression changes the spectrum.',
  },
  { magic: 'RIFX', what: 'a WAV file with big-endian numbers (RIFX)', cure: 'Save it as RIFF WAV.' },
  { magic: 'RIFF', what: 'a RIFF file, but not a WAV file', cure: 'Upload a WAV file.' },
  { magic: '\u001f\u008b', what: 'a gzip archive', cure: 'Unpack it and upload the file inside.' },
];

/** Refuses files of well-known other kinds by their first bytes, naming what they are. */
export function refuseKnownBinary(head: Uint8Array, fileName: string): void {
  const start = String.fromCharCode(...head.subarray(0, 8));
  const known = KNOWN.find(({ magic }) => start.startsWith(magic));
  if (known === undefined) return;
  refuse('not-a-capture', `"${fileName}" is ${known.what}; it is not recognised as a capture.`, known.cure);
}
