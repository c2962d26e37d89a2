import { colours } from './theme.js';

/** Height of each falling stroke as a part of the mark's height. */
const strokes = [1, 0.78, 0.52, 0.36];

/** The mark: four falling strokes and one through them. `size` is its height in points. */
export function drawMark(doc: PDFKit.PDFDocument, x: number, y: number, size: number): void {
  const step = size * 0.36;
  doc
    .save()
    .lineCap('butt')
    .lineWidth(size * 0.13);
  strokes.forEach((height, index) => {
    const at = x + size * 0.3 + index * step;
    doc.moveTo(at, y + size).lineTo(at, y + size - size * height);
  });
  doc.stroke(colours.ink);
  doc
    .lineWidth(size * 0.13)
    .moveTo(x, y + size * 0.86)
    .lineTo(x + size * 1.75, y + size * 0.28)
    .stroke(colours.over);
  doc.restore();
}
