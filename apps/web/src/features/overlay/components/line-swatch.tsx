import { chakra } from '@chakra-ui/react';
import { channelStyle, type ChannelSymbol } from '../../../lib/theme/channel-styles.js';

/** Outline of each marker about the origin, 9 px across. */
const outlines: Record<ChannelSymbol, string> = {
  circle: 'M-4 0a4 4 0 1 0 8 0a4 4 0 1 0 -8 0z',
  'circle-open': 'M-4 0a4 4 0 1 0 8 0a4 4 0 1 0 -8 0z',
  square: 'M-3.7-3.7h7.4v7.4h-7.4z',
  'square-open': 'M-3.7-3.7h7.4v7.4h-7.4z',
  'triangle-up': 'M0-4.6 4.4 3.2h-8.8z',
  'triangle-down-open': 'M0 4.6 4.4-3.2h-8.8z',
  diamond: 'M0-5 5 0 0 5-5 0z',
  'diamond-open': 'M0-5 5 0 0 5-5 0z',
  cross: 'M-1.5-4.5h3v3h3v3h-3v3h-3v-3h-3v-3h3z',
  x: 'M-4-2.2-2.2-4 0-1.8 2.2-4 4-2.2 1.8 0 4 2.2 2.2 4 0 1.8-2.2 4-4 2.2-1.8 0z',
  bowtie: 'M-4.6-4 0 0-4.6 4zM4.6-4 0 0 4.6 4z',
  'hourglass-open': 'M-4-4.6h8L0 0zM-4 4.6h8L0 0z',
};

/** A piece of a channel's line with its marker, as it stands in the chart. */
export function LineSwatch({ style }: { style: number }) {
  const { dashArray, symbol } = channelStyle(style);
  const isOpen = symbol.endsWith('-open');
  return (
    <chakra.svg
      viewBox="-20 -6 40 12"
      width="40px"
      height="12px"
      flexShrink="0"
      color={`channel.${style + 1}`}
      stroke="currentColor"
      strokeWidth="1.5"
      aria-hidden="true"
    >
      <path d="M-20 0H20" strokeDasharray={dashArray} />
      <chakra.path d={outlines[symbol]} fill={isOpen ? 'sheet' : 'currentColor'} />
    </chakra.svg>
  );
}
