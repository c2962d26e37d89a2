import { parseStamp } from './time-stamp.js';

/** Turns calendar or clock stamps into seconds after the first one; a clock that passes midnight goes on counting. */
export function makeStampReader(): { read: (text: string) => number; firstText: () => string | null } {
  let originS: number | null = null;
  let first: string | null = null;
  let dayS = 0;
  let lastS = -Infinity;
  const read = (text: string): number => {
    const stamp = parseStamp(text);
    if (stamp === null) return NaN;
    if (originS === null) {
      originS = stamp.wholeSeconds;
      first = text;
    }
    const onlyClock = stamp.wholeSeconds < 86400;
    if (onlyClock && stamp.wholeSeconds + dayS < lastS - 43200) dayS += 86400;
    lastS = stamp.wholeSeconds + dayS;
    return lastS - originS + stamp.fraction;
  };
  return { read, firstText: () => first };
}
