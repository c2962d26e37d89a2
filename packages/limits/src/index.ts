export { evaluate, type Evaluation } from './evaluate.js';
export { limitForOrder, type LimitContext } from './limit-for-order.js';
export { basisOfChannel, measurementOfChannel, type Measurement } from './measurement.js';
export { findPublishedLimitSet, publishedLimitSets } from './sets/index.js';
export { sharesOfSummary } from './shares.js';
