/** The database that the product works on: the one named by DATABASE_URL, or a private cluster. */
import { keptClusterHome } from './cluster-home.mjs';
import { startCluster } from './cluster.mjs';

/**
 * @param {string} dataDirectory
 * @returns {Promise<string>} its address
 */
export async function productDatabase(dataDirectory) {
  if (process.env.DATABASE_URL) return process.env.DATABASE_URL;
  const cluster = await startCluster(await keptClusterHome(dataDirectory));
  await cluster.ensureDatabase('overtally');
  return cluster.url('overtally');
}
