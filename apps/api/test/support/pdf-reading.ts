import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

/** Pages of a PDF as poppler lays their text out, spaces made plain. */
export function pagesOfPdf(pdf: Uint8Array): string[] {
  const text = execFileSync('pdftotext', ['-layout', '-', '-'], { input: pdf, encoding: 'utf8' });
  return text.replaceAll('\u00a0', ' ').split('\f').slice(0, -1);
}

/** All text of a PDF in one line, so that a sentence is found wherever it was broken. */
export function wordsOfPdf(pdf: Uint8Array): string {
  const text = execFileSync('pdftotext', ['-', '-'], { input: pdf, encoding: 'utf8' });
  return text.replaceAll('\u00a0', ' ').replaceAll(/\s+/g, ' ');
}

export interface Raster {
  width: number;
  height: number;
  /** Red, green, blue and opacity of each pixel. */
  data: Uint8ClampedArray;
}

/** One page, counted from 1, as pixels. */
export function pageAsPixels(pdf: Uint8Array, page: number, dotsPerInch: number): Raster {
  const folder = mkdtempSync(join(tmpdir(), 'overtally-page-'));
  try {
    const file = join(folder, 'report.pdf');
    writeFileSync(file, pdf);
    const range = ['-f', String(page), '-l', String(page)];
    execFileSync('pdftoppm', [
      '-r',
      String(dotsPerInch),
      ...range,
      '-singlefile',
      file,
      join(folder, 'page'),
    ]);
    return pixelsOf(readFileSync(join(folder, 'page.ppm')));
  } finally {
    rmSync(folder, { recursive: true });
  }
}

/** A portable pixmap of the binary kind, "P6", width, height and 255 each by one white space, then the pixels. */
function pixelsOf(pixmap: Buffer): Raster {
  const head = /^P6\s(\d+)\s(\d+)\s255\s/.exec(pixmap.toString('latin1', 0, 64))!;
  const [width, height] = [Number(head[1]), Number(head[2])];
  const data = new Uint8ClampedArray(4 * width * height).fill(255);
  for (let pixel = 0; pixel < width * height; pixel += 1) {
    const at = head[0].length + 3 * pixel;
    data.set(pixmap.subarray(at, at + 3), 4 * pixel);
  }
  return { width, height, data };
}
