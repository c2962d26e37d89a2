import { migrateToLatest, openPool } from '@overtally/db';
import type { TestProject } from 'vitest/node';
import { databaseUrl, onServer } from './database-server.js';

declare module 'vitest' {
  export interface ProvidedContext {
    templateDatabase: string;
  }
}

/** Migrates one database that every test file clones; removed at the end. */
export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  const name = `overtally_template_${process.pid}`;
  await onServer(`drop database if exists ${name}`);
  await onServer(`create database ${name}`);
  const pool = openPool(databaseUrl(name), 1);
  try {
    await migrateToLatest(pool);
  } finally {
    await pool.end();
  }
  project.provide('templateDatabase', name);
  return () => onServer(`drop database if exists ${name} with (force)`);
}
