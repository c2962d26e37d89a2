import { drizzle, type NodePgDatabase } from 'drizzle-orm/node-postgres';
import { migrate } from 'drizzle-orm/node-postgres/migrator';
import { fileURLToPath } from 'node:url';
import pg from 'pg';
import * as schema from './schema/index.js';

export type Database = NodePgDatabase<typeof schema>;

/** The handle inside a transaction; writing methods take it, so they cannot be called outside one. */
export type Tx = Parameters<Parameters<Database['transaction']>[0]>[0];

/** Where the generated migrations lie. */
const migrationsFolder = fileURLToPath(new URL('../migrations', import.meta.url));

/** Opens a connection pool. The caller ends it with `pool.end()`. */
export function openPool(databaseUrl: string, maxConnections = 10): pg.Pool {
  return new pg.Pool({ connectionString: databaseUrl, max: maxConnections });
}

/** The typed database over a pool. Column names are the snake_case of the property names. */
export function openDatabase(pool: pg.Pool): Database {
  return drizzle(pool, { schema, casing: 'snake_case' });
}

/** Brings the database to the newest schema; safe to call from several processes, one after the other. */
export async function migrateToLatest(pool: pg.Pool): Promise<void> {
  const client = await pool.connect();
  try {
    await client.query('select pg_advisory_lock(4310)');
    await migrate(drizzle(client), { migrationsFolder, migrationsSchema: 'drizzle' });
  } finally {
    await client.query('select pg_advisory_unlock(4310)');
    client.release();
  }
}
