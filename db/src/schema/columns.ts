import { timestamp } from 'drizzle-orm/pg-core';

/** A moment in UTC with millisecond precision, so that it survives the way through JSON unchanged. */
export const moment = () => timestamp({ withTimezone: true, precision: 3, mode: 'date' });

/** When the row was made. */
export const createdAt = timestamp({ withTimezone: true, precision: 3, mode: 'date' }).notNull().defaultNow();

/** When the row was last changed. */
export const updatedAt = timestamp({ withTimezone: true, precision: 3, mode: 'date' }).notNull().defaultNow();
