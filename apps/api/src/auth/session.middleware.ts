import { Logger } from '@nestjs/common';
import connectPgSimple from 'connect-pg-simple';
import type { RequestHandler } from 'express';
import session from 'express-session';
import type pg from 'pg';
import type { AppConfig } from '../config/app-config.js';
import './session.js';

/** Name of the session cookie, as the API document states it. */
export const SESSION_COOKIE = 'overtally_session';

const SESSION_LIFETIME_MS = 14 * 24 * 60 * 60 * 1000;

/** The store of sessions in table `sessions`; `close()` ends its clean-up timer. */
export function makeSessionStore(pool: pg.Pool) {
  const PgStore = connectPgSimple(session);
  const logger = new Logger('Sessions');
  return new PgStore({
    pool,
    tableName: 'sessions',
    createTableIfMissing: false,
    errorLog: (...parts: unknown[]) => logger.error(parts.map(String).join(' ')),
  });
}

/** Sessions by cookie; each request prolongs the session by its whole lifetime. */
export function sessionMiddleware(config: AppConfig, store: session.Store): RequestHandler {
  return session({
    name: SESSION_COOKIE,
    secret: config.sessionSecret,
    store,
    resave: false,
    saveUninitialized: false,
    rolling: true,
    cookie: {
      httpOnly: true,
      sameSite: 'lax',
      secure: config.isHttps,
      maxAge: SESSION_LIFETIME_MS,
      path: '/',
    },
  });
}
