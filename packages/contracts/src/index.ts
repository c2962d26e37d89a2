export * from './access.js';
export * from './analyses.js';
export * from './common.js';
export * from './limits.js';
export * from './people.js';
export * from './projects.js';
export * from './recordings.js';
export * from './reports.js';
