/**
 * How overlaid channels are told apart: hue, dash and marker together, so that none of them has to be
 * seen alone. Hues stay apart for protanopia, deuteranopia and tritanopia; each pair of dash and marker
 * stands once. `dash` and `symbol` are Plotly's names; `dashArray` is the same dash for SVG.
 */
export interface ChannelStyle {
  light: string;
  dark: string;
  dash: 'solid' | 'dash' | 'dot' | 'dashdot' | 'longdash' | 'longdashdot';
  dashArray: string;
  symbol: ChannelSymbol;
}

export type ChannelSymbol =
  | 'circle'
  | 'circle-open'
  | 'square'
  | 'square-open'
  | 'triangle-up'
  | 'triangle-down-open'
  | 'diamond'
  | 'diamond-open'
  | 'cross'
  | 'x'
  | 'bowtie'
  | 'hourglass-open';

export const channelStyles: readonly ChannelStyle[] = [
  { light: '#0B6BA8', dark: '#6DB7EA', dash: 'solid', dashArray: '', symbol: 'circle' },
  { light: '#B5560E', dark: '#F0A35E', dash: 'dash', dashArray: '6 3', symbol: 'square-open' },
  { light: '#3C7A4E', dark: '#86C99A', dash: 'dot', dashArray: '1.5 2.5', symbol: 'triangle-up' },
  { light: '#8A4C93', dark: '#CF9BD8', dash: 'dashdot', dashArray: '6 3 1.5 3', symbol: 'diamond-open' },
  { light: '#3B9B9B', dark: '#C9F7D9', dash: 'longdash', dashArray: '10 3', symbol: 'cross' },
  { light: '#751DCD', dark: '#9C75EB', dash: 'longdashdot', dashArray: '10 3 1.5 3', symbol: 'circle-open' },
  { light: '#622A0E', dark: '#DF6020', dash: 'dash', dashArray: '6 3', symbol: 'triangle-down-open' },
  { light: '#141E34', dark: '#CCCCDD', dash: 'dot', dashArray: '1.5 2.5', symbol: 'x' },
  { light: '#355047', dark: '#75EB88', dash: 'solid', dashArray: '', symbol: 'square' },
  { light: '#161698', dark: '#667F99', dash: 'dashdot', dashArray: '6 3 1.5 3', symbol: 'bowtie' },
  { light: '#380E62', dark: '#997766', dash: 'longdash', dashArray: '10 3', symbol: 'diamond' },
  {
    light: '#341914',
    dark: '#DFDF20',
    dash: 'longdashdot',
    dashArray: '10 3 1.5 3',
    symbol: 'hourglass-open',
  },
];

/** Style of the channel at `index`; after the last one they repeat. */
export function channelStyle(index: number): ChannelStyle {
  const style = channelStyles[index % channelStyles.length];
  if (!style) throw new RangeError(`Channel index ${index} must be a whole number from 0`);
  return style;
}
