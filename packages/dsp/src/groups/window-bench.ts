import { GATHERED_LINES } from '../lines/kaiser-bessel.js';
import { createLineFrame, type LineFrame } from '../lines/line-frame.js';
import type { LineTables } from '../lines/line-tables.js';
import type { Kernel } from '../wasm/kernel.js';
import type { OrderFit } from './leakage.js';
import { leakageNodes, type LeakageColumns, type LeakageNodes } from './leakage-nodes.js';

/** What belongs to one exact window length. */
export interface WindowTables {
  lines: LineTables;
  /** null when the lines are orthogonal. */
  leakage: { fit: OrderFit; columns: LeakageColumns } | null;
}

/** The memory in which windows of about one length are analysed, with the tables of one exact length at a time. */
export interface WindowBench {
  readonly frame: LineFrame;
  readonly nodes: LeakageNodes;
  /** Peak amplitudes of the lines of the window analysed last, about its centre. */
  readonly cosine: Float64Array;
  readonly sine: Float64Array;
  /** Their rms values. */
  readonly rms: Float64Array;
  /** @returns mean of the squares of the samples */
  analyse(tables: WindowTables, samples: Float64Array, start: number, count: number): number;
}

/** @param lengths in samples; windows may be up to half a sample shorter than the shortest */
export function createWindowBench(
  kernel: Kernel,
  lengths: { shortest: number; longest: number },
  lineCount: number,
  cycles: number,
  orderCount: number,
): WindowBench {
  const highest = Math.min(0.5, lineCount / lengths.shortest);
  const frame = createLineFrame(kernel, lengths.longest, highest);
  const nodes = leakageNodes(lineCount, lengths.shortest, cycles * (orderCount - 1));
  const starts = kernel.allocate(Math.ceil(lineCount / 2));
  const weights = kernel.allocate(lineCount * GATHERED_LINES);
  const factors = kernel.allocate(2 * lineCount);
  const cosineAt = kernel.allocate(inFours(lineCount));
  const sineAt = kernel.allocate(inFours(lineCount));
  const rmsAt = kernel.allocate(inFours(lineCount));
  const removal = createLeakageRemoval(kernel, nodes, lineCount, cycles, orderCount);
  const { gatherLines, lineRms } = kernel.functions;
  let loaded: WindowTables | null = null;

  function load(tables: WindowTables): void {
    kernel.integers(starts, lineCount).set(tables.lines.starts);
    kernel.floats(weights, tables.lines.weights.length).set(tables.lines.weights);
    kernel.floats(factors, tables.lines.factors.length).set(tables.lines.factors);
    if (tables.leakage) removal.load(tables.leakage.fit, tables.leakage.columns);
    loaded = tables;
  }

  return {
    frame,
    nodes,
    cosine: kernel.floats(cosineAt, lineCount),
    sine: kernel.floats(sineAt, lineCount),
    rms: kernel.floats(rmsAt, lineCount),
    analyse(tables, samples, start, count) {
      if (loaded !== tables) load(tables);
      const square = frame.transform(samples, start, count);
      gatherLines(frame.re, frame.im, starts, weights, GATHERED_LINES, factors, lineCount, cosineAt, sineAt);
      if (tables.leakage) removal.apply(cosineAt, sineAt);
      lineRms(cosineAt, sineAt, lineCount, rmsAt);
      return square;
    },
  };
}

interface LeakageRemoval {
  load(fit: OrderFit, columns: LeakageColumns): void;
  apply(cosineAt: number, sineAt: number): void;
}

function createLeakageRemoval(
  kernel: Kernel,
  nodes: LeakageNodes,
  lineCount: number,
  cycles: number,
  orderCount: number,
): LeakageRemoval {
  const nodeCount = nodes.places.length;
  const nodeRows = inFours(nodeCount);
  const lineRows = inFours(lineCount);
  const factorRow = 2 * Math.ceil(orderCount / 2);
  const part = () => ({
    factor: kernel.allocate(factorRow * orderCount),
    columns: kernel.allocate(nodeRows * orderCount),
    orders: kernel.allocate(factorRow),
  });
  const [cosine, sine] = [part(), part()];
  const spread = kernel.allocate(nodes.spread === null ? 0 : lineRows * nodeCount);
  const sums = kernel.allocate(nodeRows);
  if (nodes.spread) layRows(kernel, spread, lineRows, nodes.spread, nodeCount);
  const { addColumns, addOrders, fitOrders } = kernel.functions;
  let own = 0;

  function removeFrom(lines: number, { factor, columns, orders }: typeof cosine, doubling: number): void {
    fitOrders(lines, cycles, orderCount, doubling, factor, orders);
    if (nodes.spread === null) {
      addColumns(columns, orders, orderCount, lineRows, lines);
    } else {
      kernel.floats(sums, nodeRows).fill(0);
      addColumns(columns, orders, orderCount, nodeRows, sums);
      addColumns(spread, sums, nodeCount, lineRows, lines);
    }
    addOrders(lines, cycles, orderCount, own, orders);
  }

  return {
    load(fit, columns) {
      layRows(kernel, cosine.factor, factorRow, fit.cosineFactor, orderCount);
      layRows(kernel, sine.factor, factorRow, fit.sineFactor, orderCount);
      layRows(kernel, cosine.columns, nodeRows, columns.cosine, orderCount);
      layRows(kernel, sine.columns, nodeRows, columns.sine, orderCount);
      own = columns.own;
    },
    apply(cosineAt, sineAt) {
      removeFrom(cosineAt, cosine, 2);
      removeFrom(sineAt, sine, 1);
    },
  };
}

function inFours(count: number): number {
  return 4 * Math.ceil(count / 4);
}

/** Copies `count` rows of equal length to rows of `rowLength` numbers. */
function layRows(
  kernel: Kernel,
  address: number,
  rowLength: number,
  rows: Float64Array,
  count: number,
): void {
  const target = kernel.floats(address, rowLength * count);
  const length = rows.length / count;
  for (let h = 0; h < count; h++) target.set(rows.subarray(h * length, (h + 1) * length), h * rowLength);
}
