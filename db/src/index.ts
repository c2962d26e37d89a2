export * from './client.js';
export * as schema from './schema/index.js';
