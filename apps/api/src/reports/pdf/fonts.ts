import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import type { TextStyle } from './theme.js';
import { unpackWoff } from './woff.js';

const require = createRequire(import.meta.url);

/** IBM Plex as whole fonts (woff), so that Greek, Cyrillic and the signs of the trade are there. */
const files: Record<TextStyle['font'], string> = {
  sans: '@ibm/plex-sans/fonts/complete/woff/IBMPlexSans-Regular.woff',
  'sans-strong': '@ibm/plex-sans/fonts/complete/woff/IBMPlexSans-SemiBold.woff',
  mono: '@ibm/plex-mono/fonts/complete/woff/IBMPlexMono-Regular.woff',
  'mono-strong': '@ibm/plex-mono/fonts/complete/woff/IBMPlexMono-SemiBold.woff',
};

const unpacked = new Map<string, Buffer>();

/** A font file as OpenType, unpacked on first use. */
function fontData(file: string): Buffer {
  const known = unpacked.get(file);
  if (known) return known;
  const data = unpackWoff(readFileSync(require.resolve(file)));
  unpacked.set(file, data);
  return data;
}

const inSans: Record<TextStyle['font'], TextStyle['font']> = {
  sans: 'sans',
  'sans-strong': 'sans-strong',
  mono: 'sans',
  'mono-strong': 'sans-strong',
};

/** Stands for a character that no font of the report has. */
export const replacementCharacter = '\ufffd';

interface GlyphSource {
  hasGlyphForCodePoint(codePoint: number): boolean;
}

/** Registers the report's fonts with a document and keeps texts to the characters they can print. */
export class Fonts {
  private readonly sources = new Map<string, GlyphSource>();
  /** True once a character had to be replaced, so that the report can say so. */
  replaced = false;

  constructor(doc: PDFKit.PDFDocument) {
    for (const [name, file] of Object.entries(files)) {
      doc.registerFont(name, fontData(file));
      doc.font(name);
      this.sources.set(name, (doc as unknown as { _font: { font: GlyphSource } })._font.font);
    }
  }

  /**
   * The text and font to print with: signs that the monospaced face lacks (Ω, Greek) move the text to the
   * proportional one; what that lacks too becomes U+FFFD, never an empty place.
   */
  fit(text: string, font: TextStyle['font']): { text: string; font: TextStyle['font'] } {
    const normal = text.normalize('NFC').replaceAll('μ', 'µ').replaceAll('\u2126', 'Ω').replaceAll('\t', ' ');
    if (this.covers(normal, font)) return { text: normal, font };
    const fallback = inSans[font];
    if (this.covers(normal, fallback)) return { text: normal, font: fallback };
    this.replaced = true;
    const printable = [...normal].map((sign) => (this.covers(sign, fallback) ? sign : replacementCharacter));
    return { text: printable.join(''), font: fallback };
  }

  private covers(text: string, font: TextStyle['font']): boolean {
    const source = this.sources.get(font)!;
    return [...text].every((sign) => sign === '\n' || source.hasGlyphForCodePoint(sign.codePointAt(0)!));
  }
}
