export * from './analyses.js';
export * from './identity.js';
export * from './limits.js';
export * from './projects.js';
export * from './recordings.js';
export * from './reports.js';
