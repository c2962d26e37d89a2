import { Fonts } from './fonts.js';
import { boldLine, colours, hairline, page, text, textWidth, type TextStyle } from './theme.js';

interface Place {
  x?: number;
  y?: number;
  width?: number;
  align?: 'left' | 'right' | 'center';
}

interface TagOptions {
  /** What a figure shows, in words. */
  alt?: string;
  /** For header cells of a table. */
  scope?: 'Row' | 'Column';
}

/** The report's page as the parts see it: a cursor, tagged text, rules and page breaks. */
export class Sheet {
  readonly left = page.left;
  readonly width = textWidth;
  readonly right = page.left + textWidth;
  readonly floor = page.height - page.bottom;
  readonly fonts: Fonts;
  private parent: PDFKit.PDFStructureElement;
  private bookmark: PDFKit.PDFOutline | undefined;

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
    if (this.y + height <= this.floor || this.y <= page.top) return false;
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

  /** Draws one tagged piece. */
  tag(type: string, draw: () => void, options: TagOptions = {}): void {
    const element = this.doc.struct(type, options, [draw]);
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

  /** One unwrapped line at a place, made smaller where it would not fit its width; the cursor stays. */
  line(content: string, style: TextStyle, x: number, y: number, place: Omit<Place, 'x' | 'y'> = {}): void {
    const { width, align } = place;
    const fitted = width === undefined ? content : this.fitted(content, style, width);
    const printed = this.use(fitted, style);
    const slack = width === undefined ? 0 : width - this.doc.widthOfString(printed);
    const shift = align === 'right' ? slack : align === 'center' ? slack / 2 : 0;
    const cursor = this.y;
    this.doc.text(printed, x + shift, y, { lineBreak: false });
    this.y = cursor;
  }

  /** Items one under the other, each behind a dash. */
  list(items: readonly string[], style: TextStyle = text.cell): void {
    this.group('L', () => {
      for (const item of items) {
        this.room(2 * style.size * 1.4);
        this.group('LI', () => {
          const top = this.y;
          this.tag('Lbl', () => this.line('–', style, this.left, top));
          this.y = top;
          this.paragraph(item, style, 'LBody', { x: this.left + 12, width: this.width - 12 });
        });
        this.y += 3;
      }
    });
  }

  /** Height that `flow` would take. */
  heightOf(content: string, style: TextStyle, width = this.width): number {
    const printed = this.use(content, style);
    return this.doc.heightOfString(printed, { width, lineGap: style.size * 0.12 });
  }

  widthOf(content: string, style: TextStyle): number {
    return this.doc.widthOfString(this.use(content, style));
  }

  /** The line cut to a width, with an ellipsis where something was cut off. */
  fitted(content: string, style: TextStyle, width: number): string {
    if (this.widthOf(content, style) <= width) return content;
    const signs = [...content];
    let [fits, not] = [0, signs.length];
    while (not - fits > 1) {
      const middle = (fits + not) >> 1;
      if (this.widthOf(`${signs.slice(0, middle).join('')}…`, style) <= width) fits = middle;
      else not = middle;
    }
    return `${signs.slice(0, fits).join('').trimEnd()}…`;
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
  heading(content: string, keep = 60, type: 'H2' | 'H3' = 'H3'): void {
    if (!this.room(30 + keep)) this.y += 14;
    if (type === 'H2') this.mark(content);
    else this.mark(content, this.bookmark);
    this.paragraph(content, text.subheading, type);
    this.rule(this.y + 2, boldLine, colours.ink);
    this.y += 9;
  }

  /** Adds a place to the outline; one that stands under no other takes those that follow under it. */
  mark(title: string, under?: PDFKit.PDFOutline): void {
    const made = (under ?? this.doc.outline).addItem(title);
    if (under === undefined) this.bookmark = made;
  }

  private use(content: string, style: TextStyle): string {
    const fitted = this.fonts.fit(content, style.font);
    this.doc.font(fitted.font).fontSize(style.size).fillColor(style.colour);
    return fitted.text;
  }
}
