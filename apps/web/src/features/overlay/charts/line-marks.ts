import { channelStyle } from '../../../lib/theme/channel-styles.js';

/** Colour, dash and marker of a style in the theme at hand. */
export function lineMarks(style: number, dark: boolean) {
  const { light, dark: darkColor, dash, symbol } = channelStyle(style);
  return { color: dark ? darkColor : light, dash, symbol };
}
