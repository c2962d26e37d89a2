export { evaluate, type Evaluation } from './evaluate.js';
export { limitForOrder, type LimitContext } from './limit-for-order.js';
export { basisOfChannel, measurementOfChannel, type CurrentShape, type Measurement } from './measurement.js';
export { measurementOfSeries, seriesOfChannel } from './study-series.js';
export {
  limitRows,
  neededParameters,
  optionalParameters,
  resolveLimits,
  shownLimits,
  type LimitGap,
  type Resolution,
  type ResolvedLimits,
} from './resolve.js';
export { findPublishedLimitSet, publishedLimitSets } from './sets/index.js';
export { sharesOfSummary } from './shares.js';
export { ordersAbove150 } from './excursions.js';
export { combineRepeats, repeatabilityLimitPercent, type CombinedRepeats } from './repeats.js';
export { cloneLimitSet } from './custom/clone-limit-set.js';
export { unitCell } from './custom/unit-cell.js';
export { commonReading, readByOwn, readingOf } from './custom/common-reading.js';
export { limitTableRows, limitTableText, type LimitTableRow } from './custom/limit-table-text.js';
export {
  limitTableLines,
  parseLimitRows,
  parseLimitTable,
  type LimitTable,
  type TableProblem,
} from './custom/parse-limit-table.js';
export { checkTestSupply, type NominalSupply, type SupplyCheck } from './test-supply.js';
export { supplyVerdict, type StatedSupply } from './supply-verdict.js';
export { unitRatio } from './units.js';
