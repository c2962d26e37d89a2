export { transform } from './transform';
export { chirpTransform } from './chirp';
export { separate, unpackEven, unpackOdd } from './real-spectrum';
export { addPowerEven, addPowerOdd, mean, pairSegments } from './power';
export { decimate, gatherLines, lineRms, meanSquare, mirror, weigh } from './lines';
export { addColumns, addOrders, fitOrders } from './leakage';
export { calmSamples, demodulate, sumBlock } from './blocks';
export { foldBlock, projectBlock, projectTimedBlock } from './projections';
