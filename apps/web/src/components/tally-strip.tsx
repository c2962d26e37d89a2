import { chakra } from '@chakra-ui/react';
import { tallyGeometry, tallyWords, type OrderShare } from './tally-geometry.js';

interface TallyStripProps {
  shares: readonly OrderShare[];
  /** For screen readers; made from the shares when absent: "over at 15, 19 and 10 more". */
  label?: string;
  size?: 'sm' | 'md' | 'lg';
}

const heights = { sm: 20, md: 28, lg: 44 } as const;
const color = (token: string) => `var(--chakra-colors-${token})`;

/**
 * The tally strip: one tick per order from 2 to 40 under a line that is the limit. A tick through the line
 * is over and vermilion, a dot is next to nothing, a gap has no limit.
 */
export function TallyStrip({ shares, label, size = 'sm' }: TallyStripProps) {
  const strip = tallyGeometry(shares, heights[size]);
  const scale = size === 'sm' ? 1 : heights[size] / heights.sm;
  return (
    <chakra.svg
      role="img"
      aria-label={label ?? tallyWords(shares)}
      viewBox={`0 0 ${strip.width} ${strip.height}`}
      preserveAspectRatio="none"
      height={`${strip.height}px`}
      width={`${Math.round(strip.width * Math.min(scale, 1.5))}px`}
      maxW="100%"
      display="block"
      flexShrink="0"
      shapeRendering="crispEdges"
    >
      <path d={`M0 ${strip.limitY}H${strip.width}`} stroke={color('rule-strong')} strokeWidth="1" />
      <path d={strip.dots} fill={color('rule-strong')} />
      <path d={strip.within} fill={color('ink')} />
      <path d={strip.over} fill={color('over')} />
    </chakra.svg>
  );
}
