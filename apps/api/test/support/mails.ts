import { schema } from '@overtally/db';
import { eq, sql } from 'drizzle-orm';
import { setTimeout as wait } from 'node:timers/promises';
import type { TestApp } from './test-app.js';

const { mails } = schema;
type MailRow = typeof mails.$inferSelect;

/** The messages to an address, the oldest first. */
export function mailsTo({ database }: TestApp, address: string): Promise<MailRow[]> {
  return database.select().from(mails).where(eq(mails.toAddress, address)).orderBy(mails.createdAt);
}

/** The newest message to an address once `done` holds for it. */
export async function mailTo(
  test: TestApp,
  address: string,
  done: (mail: MailRow) => boolean = ({ status }) => status === 'sent',
  withinMs = 20_000,
): Promise<MailRow> {
  const end = Date.now() + withinMs;
  for (;;) {
    const mail = (await mailsTo(test, address)).at(-1);
    if (mail && done(mail)) return mail;
    if (Date.now() > end) throw new Error(`The message to ${address} stayed at ${JSON.stringify(mail)}`);
    await wait(50);
  }
}

/** Lets every waiting job run now, instead of after its wait. */
export async function makeJobsDue({ database }: TestApp): Promise<void> {
  await database.execute(
    sql`update graphile_worker._private_jobs set run_at = now() where locked_at is null and run_at > now()`,
  );
}

/** The secret of the link in a message: what stands behind # (RFC 3986, 3.5). */
export function tokenIn(text: string): string {
  const token = /#([\w-]+)/.exec(text)?.[1];
  if (token === undefined) throw new Error(`There is no link in: ${text}`);
  return token;
}
