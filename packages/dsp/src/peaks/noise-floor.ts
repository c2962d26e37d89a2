import { median } from '../figures/median.js';

/** Median of an exponentially distributed power, as a line of noise has it, relative to its mean. */
const MEDIAN_OF_NOISE = Math.LN2;
const SHORTEST_BLOCK = 64;
/** Blocks grow with frequency, so that noise that falls with frequency is followed where it is steep. */
const BLOCK_SHARE = 0.25;

/**
 * Mean noise power per line: medians over blocks of lines, which peaks do not move as long as they take up less than half
 * of a block, joined by straight lines between the logarithms (background estimates of this kind are compared by
 * W. A. Struzinski and E. D. Lowe, J. Acoust. Soc. Am. 76(6), 1984).
 *
 * @param power of the lines from DC; DC itself is left out
 * @param averages periodograms averaged in each line; the median of a mean of many is the mean itself
 */
export function noiseFloor(power: Float64Array, averages = 1): Float64Array {
  const blocks = blockFloors(power, medianShare(averages));
  const floor = new Float64Array(power.length);
  floor.fill(blocks[0]!.power);
  for (let b = 0; b + 1 < blocks.length; b++) joinBlocks(floor, blocks[b]!, blocks[b + 1]!);
  const last = blocks.at(-1)!;
  floor.fill(last.power, Math.ceil(last.centre));
  return floor;
}

interface Block {
  centre: number;
  power: number;
}

function blockFloors(power: Float64Array, share: number): Block[] {
  const blocks: Block[] = [];
  let from = Math.min(1, power.length - 1);
  while (from < power.length) {
    let to = from + Math.max(SHORTEST_BLOCK, Math.floor(BLOCK_SHARE * from));
    // A last block too short for a median joins the one before it.
    if (power.length - to < SHORTEST_BLOCK) to = power.length;
    blocks.push({ centre: (from + to - 1) / 2, power: median(power.subarray(from, to)) / share });
    from = to;
  }
  return blocks;
}

/** The lines between the centres of two blocks, in geometric progression; a step where one of them holds nothing. */
function joinBlocks(floor: Float64Array, left: Block, right: Block): void {
  const from = Math.ceil(left.centre);
  const step =
    left.power > 0 && right.power > 0 ? (right.power / left.power) ** (1 / (right.centre - left.centre)) : 1;
  let value = left.power * step ** (from - left.centre);
  for (let k = from; k < right.centre; k++) {
    floor[k] = value;
    value *= step;
  }
}

/** Median over mean of an average of n exponentially distributed powers (E. B. Wilson, M. M. Hilferty, 1931). */
function medianShare(averages: number): number {
  return averages === 1 ? MEDIAN_OF_NOISE : (1 - 1 / (9 * averages)) ** 3;
}
