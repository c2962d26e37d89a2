import type { OrderVerdict } from '@overtally/contracts';
import type { Sheet } from './sheet.js';
import { colours, hairline } from './theme.js';
import { isOver } from './words.js';

const firstOrder = 2;
const lastOrder = 40;
const groupOf = 5;
/** A tick is drawn up to this share; more looks the same, the figures tell. */
const tallestShare = 1.4;
const stub = 0.8;

/**
 * The tally strip: one tick per order from 2 to 40 in groups of five under the line that is the limit.
 * Height is the share of the limit used; a tick through the line is over.
 */
export function drawTallyStrip(
  sheet: Sheet,
  orders: readonly OrderVerdict[],
  x: number,
  y: number,
  width: number,
  height: number,
): void {
  const byOrder = new Map(orders.map((entry) => [entry.order, entry]));
  const last = Math.max(
    lastOrder,
    ...orders.filter((entry) => entry.limit !== null).map((entry) => entry.order),
  );
  const count = last - firstOrder + 1;
  const slot = width / (count + Math.floor((count - 1) / groupOf) * 0.6);
  const foot = y + height;
  const full = height / tallestShare;
  const { doc } = sheet;
  doc
    .lineWidth(hairline)
    .moveTo(x, foot - full)
    .lineTo(x + width, foot - full)
    .stroke(colours.ruleStrong);
  for (let index = 0; index < count; index += 1) {
    const entry = byOrder.get(firstOrder + index);
    const share = (entry?.sharePercent ?? 0) / 100;
    const tick = Math.max(stub, Math.min(share, tallestShare) * full);
    const at = x + (index + Math.floor(index / groupOf) * 0.6) * slot;
    doc.rect(at, foot - tick, slot * 0.62, tick).fill(tickColour(entry));
  }
}

function tickColour(entry: OrderVerdict | undefined): string {
  if (entry?.sharePercent === null || entry === undefined) return colours.rule;
  return isOver(entry.result) ? colours.over : colours.ink;
}
