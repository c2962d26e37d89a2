import pg from 'pg';

/** Address of a database on the test server; the server is that of TEST_DATABASE_URL. */
export function databaseUrl(name: string): string {
  const url = new URL(serverUrl());
  url.pathname = `/${name}`;
  return url.href;
}

/** Runs statements on the test server that belong to no one database. */
export async function onServer(statement: string): Promise<void> {
  const client = new pg.Client({ connectionString: serverUrl() });
  await client.connect();
  try {
    await client.query(statement);
  } finally {
    await client.end();
  }
}

function serverUrl(): string {
  const url = process.env.TEST_DATABASE_URL;
  if (!url) {
    throw new Error(
      'Set TEST_DATABASE_URL to a PostgreSQL database whose user may create databases; npm test does',
    );
  }
  return url;
}
