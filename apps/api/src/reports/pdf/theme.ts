/** Colours of the printed page; the names are those of the screens' light theme. */
export const colours = {
  page: '#FFFFFF',
  paper: '#F7F3EA',
  rule: '#DED6C5',
  ruleStrong: '#B8AD97',
  ink: '#1B2430',
  inkSoft: '#5A6471',
  act: '#1F4E8C',
  over: '#C23B1A',
  near: '#9A6200',
  within: '#4C7763',
} as const;

/** A4 in PostScript points, with the margins of the text area. */
export const page = { width: 595.28, height: 841.89, left: 56, right: 50, top: 68, bottom: 80 } as const;
export const textWidth = page.width - page.left - page.right;

export const hairline = 0.5;
export const boldLine = 1.5;

export interface TextStyle {
  font: 'sans' | 'sans-strong' | 'mono' | 'mono-strong';
  size: number;
  colour: string;
}

const style = (font: TextStyle['font'], size: number, colour: string): TextStyle => ({ font, size, colour });

export const text = {
  kicker: style('sans-strong', 9, colours.inkSoft),
  title: style('sans-strong', 22, colours.ink),
  verdict: style('sans-strong', 19, colours.ink),
  heading: style('sans-strong', 15, colours.ink),
  subheading: style('sans-strong', 10, colours.ink),
  body: style('sans', 9.5, colours.ink),
  strong: style('sans-strong', 9.5, colours.ink),
  soft: style('sans', 8.5, colours.inkSoft),
  caption: style('sans', 7, colours.inkSoft),
  cell: style('sans', 8.5, colours.ink),
  cellStrong: style('sans-strong', 8.5, colours.ink),
  figure: style('mono', 8, colours.ink),
  figureStrong: style('mono-strong', 8, colours.ink),
  axis: style('sans', 6.5, colours.inkSoft),
  axisStrong: style('sans-strong', 6.5, colours.over),
  tiny: style('sans', 5.5, colours.inkSoft),
  strip: style('sans', 7.5, colours.ink),
  stripStrong: style('mono-strong', 7.5, colours.ink),
} as const;

/** The same style in another colour. */
export const tinted = (base: TextStyle, colour: string): TextStyle => ({ ...base, colour });
