/**
 * How overlaid channels are told apart: hue, dash and marker together, so that none of them has to be
 * seen alone. Hues keep distinct lightness steps for protanopia, deuteranopia and tritanopia.
 * `dash` and `symbol` are Plotly's names; `dashArray` is the same dash for SVG.
 */
export interface ChannelStyle {
  light: string;
  dark: string;
  dash: 'solid' | 'dash' | 'dot' | 'dashdot' | 'longdash' | 'longdashdot';
  dashArray: string;
  symbol: string;
}

export const channelStyles: readonly ChannelStyle[] = [
  { light: '#0B6BA8', dark: '#6DB7EA', dash: 'solid', dashArray: '', symbol: 'circle' },
  { light: '#B5560E', dark: '#F0A35E', dash: 'dash', dashArray: '6 3', symbol: 'square-open' },
  { light: '#3C7A4E', dark: '#86C99A', dash: 'dot', dashArray: '1.5 2.5', symbol: 'triangle-up' },
  { light: '#8A4C93', dark: '#CF9BD8', dash: 'dashdot', dashArray: '6 3 1.5 3', symbol: 'diamond-open' },
  { light: '#5B5F1D', dark: '#C5C763', dash: 'longdash', dashArray: '10 3', symbol: 'cross' },
  { light: '#A83A5B', dark: '#F291AC', dash: 'longdashdot', dashArray: '10 3 1.5 3', symbol: 'circle-open' },
  { light: '#0F7C80', dark: '#62CBCE', dash: 'dash', dashArray: '6 3', symbol: 'triangle-down-open' },
  { light: '#5B5BA6', dark: '#ABABEC', dash: 'dot', dashArray: '1.5 2.5', symbol: 'x' },
];

/** Style of the channel at `index`; after the last one they repeat. */
export function channelStyle(index: number): ChannelStyle {
  const style = channelStyles[index % channelStyles.length];
  if (!style) throw new RangeError(`Channel index ${index} must be a whole number from 0`);
  return style;
}
