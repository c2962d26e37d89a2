/** Share of its limit that one order uses; null when it has no limit or no value. */
export interface OrderShare {
  order: number;
  sharePercent: number | null;
}

export interface TallyGeometry {
  width: number;
  height: number;
  /** Height of the limit line from the top. */
  limitY: number;
  /** SVG path data of the ticks within, of those over, and of the dots for next to nothing. */
  within: string;
  over: string;
  dots: string;
}

const pitch = 4.6;
const tickWidth = 3;
const groupGap = 2.6;
/** A tick over by little still has to be seen crossing the line; one over by much stays inside the strip. */
const overFrom = 112;
const overTo = 126;
const dotBelow = 3;

const firstOrder = 2;
const lastOrder = 40;

function tickX(order: number): number {
  const steps = order - firstOrder;
  const groups = Math.floor((order - 1) / 5);
  return steps * pitch + groups * groupGap;
}

const bar = (x: number, y: number, base: number) =>
  `M${x.toFixed(1)} ${y.toFixed(1)}h${tickWidth}V${base}h-${tickWidth}z`;

/** Lays out orders 2 to 40 in groups that end at each multiple of five. */
export function tallyGeometry(shares: readonly OrderShare[], height: number): TallyGeometry {
  const base = height - 0.5;
  const limitY = Math.round(height * 0.21) + 0.5;
  const perPercent = (base - limitY) / 100;
  const paths = { within: '', over: '', dots: '' };
  for (const { order, sharePercent } of shares) {
    if (sharePercent === null || order < firstOrder || order > lastOrder) continue;
    const x = tickX(order);
    if (sharePercent > 100) {
      const drawn = Math.min(overTo, Math.max(overFrom, sharePercent));
      paths.over += bar(x, Math.max(0, base - drawn * perPercent), base);
    } else if (sharePercent < dotBelow) {
      paths.dots += bar(x, base - 1.5, base);
    } else {
      paths.within += bar(x, base - sharePercent * perPercent, base);
    }
  }
  return { width: Math.ceil(tickX(lastOrder) + tickWidth), height, limitY, ...paths };
}

/** The strip in words: "over at 15, 19 and 10 more", "within", "no limit for these orders". */
export function tallyWords(shares: readonly OrderShare[]): string {
  const judged = shares.filter((share) => share.sharePercent !== null);
  if (judged.length === 0) return 'no limit for these orders';
  const over = judged.filter((share) => (share.sharePercent ?? 0) > 100).map((share) => share.order);
  if (over.length === 0) return 'within';
  if (over.length <= 3) return `over at ${joinWords(over)}`;
  return `over at ${over.slice(0, 2).join(', ')} and ${over.length - 2} more`;
}

function joinWords(orders: readonly number[]): string {
  if (orders.length < 2) return String(orders[0]);
  return `${orders.slice(0, -1).join(', ')} and ${orders.at(-1)}`;
}
