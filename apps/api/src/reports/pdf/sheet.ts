import { Fonts } from './fonts.js';
import { boldLine, colours, hairline, page, text, textWidth, type TextStyle } from './theme.js';

interface Place {
  x?: number;
  y?: number;
  width?: number;
  align?: 'left' | 'right' | 'center';
}

/** The report's page as the parts see it: a cursor, tagged text, rules and page breaks. */
export class Sheet {
  readonly left = page.left;
  readonly width = textWidth;
  readonly floor = page.height - page.bottom;
  readonly fonts: Fonts;
  private parent: PDFKit.PDFStructureElement;

  constructor(readonly doc: PDFKit.PDFDocument) {
    this.fonts = new Fonts(doc);
    this.parent = doc.struct('Document');
    doc.addStructure(this.parent);
  }

  get y(): number {
    return this.doc.y;
  }

  set y(value: number) {
    this.doc.y = value;
  }

  /** Begins a page when less than `height` is left on this one; true when it did. */
  room(height: number): boolean {
    if (this.y + height <= this.floor) return false;
    this.newPage();
    return true;
  }

  newPage(): void {
    this.doc.addPage();
    this.y = page.top;
  }

  /** Nests what `body` draws in a structure element such as Sect, Table or TR. */
  group(type: string, body: () => void): void {
    const outer = this.parent;
    const element = this.doc.struct(type);
    outer.add(element);
    this.parent = element;
    body();
    this.parent = outer;
    element.end();
  }

  /** Draws one tagged piece; `alt` says in words what a figure shows. */
  tag(type: string, draw: () => void, alt?: string): void {
    const element = this.doc.struct(type, alt === undefined ? {} : { alt }, [draw]);
    this.parent.add(element);
    element.end();
  }

  /** Draws rules and fills, which a screen reader passes over. */
  artifact(draw: () => void): void {
    this.doc.markContent('Artifact', { type: 'Layout' });
    draw();
    this.doc.endMarkedContent();
  }

  /** Flowing text at the cursor, wrapped to the width; goes on over the page where it must. */
  paragraph(content: string, style: TextStyle = text.body, type = 'P', place: Place = {}): void {
    this.tag(type, () => this.flow(content, style, place));
  }

  /** Wrapped text without a tag of its own, for use inside `tag`. Leaves the cursor below it. */
  flow(content: string, style: TextStyle, place: Place = {}): void {
    const { x = this.left, y = this.y, width = this.width, align = 'left' } = place;
    const printed = this.use(content, style);
    this.doc.text(printed, x, y, { width, align, lineGap: style.size * 0.12 });
  }

  /** One unwrapped line at a place; the cursor stays. */
  line(content: string, style: TextStyle, x: number, y: number, place: Omit<Place, 'x' | 'y'> = {}): void {
    const printed = this.use(content, style);
    const slack = place.width === undefined ? 0 : place.width - this.doc.widthOfString(printed);
    const shift = place.align === 'right' ? slack : place.align === 'center' ? slack / 2 : 0;
    const cursor = this.y;
    this.doc.text(printed, x + shift, y, { lineBreak: false });
    this.y = cursor;
  }

  /** Height that `flow` would take. */
  heightOf(content: string, style: TextStyle, width = this.width): number {
    const printed = this.use(content, style);
    return this.doc.heightOfString(printed, { width, lineGap: style.size * 0.12 });
  }

  widthOf(content: string, style: TextStyle): number {
    return this.doc.widthOfString(this.use(content, style));
  }

  /** A horizontal rule over the text width, or between two places. */
  rule(
    y = this.y,
    weight: number = hairline,
    colour: string = colours.rule,
    x = this.left,
    width = this.width,
  ): void {
    this.artifact(() =>
      this.doc
        .lineWidth(weight)
        .moveTo(x, y)
        .lineTo(x + width, y)
        .stroke(colour),
    );
  }

  /** Begins a part of a section: a heading over the one bold line, kept together with `keep` points below. */
  heading(content: string, keep = 60, type = 'H3'): void {
    if (!this.room(30 + keep)) this.y += 14;
    this.paragraph(content, text.subheading, type);
    this.rule(this.y + 2, boldLine, colours.ink);
    this.y += 9;
  }

  private use(content: string, style: TextStyle): string {
    const fitted = this.fonts.fit(content, style.font);
    this.doc.font(fitted.font).fontSize(style.size).fillColor(style.colour);
    return fitted.text;
  }
}
