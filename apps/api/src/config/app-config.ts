import { join, resolve } from 'node:path';
import type { Environment } from './environment.js';
import { usualSender, type MailSettings } from './mail-settings.js';
import { storageSettings, type StorageSettings } from './storage-settings.js';

/** Settings of the process, checked at start. Nothing else reads the environment. */
export class AppConfig {
  readonly port: number;
  readonly host: string;
  readonly databaseUrl: string;
  /** Absolute path of the folder that keeps files. */
  readonly dataDir: string;
  /** Absolute path of the built web application; null: the API alone is served. */
  readonly webDist: string | null;
  readonly sessionSecret: string;
  /** Address people use, without a slash at the end. */
  readonly publicUrl: string;
  /** Proxies that are believed who the caller is: a number of hops, or addresses; false: none. */
  readonly trustProxy: number | string[] | false;
  readonly maxUploadBytes: number;
  /** Bytes of sources that one project may hold; null: no bound. */
  readonly projectQuotaBytes: number | null;
  /** Absolute path of the folder that keeps uploads until they are recordings. */
  readonly spoolFolder: string;
  readonly worker: 'embedded' | 'off';
  readonly demo: boolean;
  readonly logLevel: Environment['LOG_LEVEL'];
  readonly logFormat: 'json' | 'pretty';
  readonly computeThreads: number;
  /** More than threads, so that a short job goes on between the parts of a long one. */
  readonly jobsAtOnce: number;
  readonly adminEmail?: string;
  readonly adminPassword?: string;
  readonly storage: StorageSettings;
  readonly mail: MailSettings;

  constructor(env: Environment) {
    this.port = env.PORT;
    this.host = env.HOST;
    this.databaseUrl = env.DATABASE_URL;
    this.dataDir = resolve(env.DATA_DIR);
    this.webDist = env.WEB_DIST === undefined ? null : resolve(env.WEB_DIST);
    this.sessionSecret = env.SESSION_SECRET;
    this.publicUrl = (env.PUBLIC_URL ?? ownAddress(env.HOST, env.PORT)).replace(/\/+$/, '');
    // Behind TLS there is a proxy; one elsewhere than on this machine must be named, as anybody could be one.
    this.trustProxy = env.TRUST_PROXY ?? (this.isHttps ? ['loopback'] : false);
    this.maxUploadBytes = bytesOf(env.MAX_UPLOAD_MB);
    this.projectQuotaBytes = env.PROJECT_QUOTA_MB === undefined ? null : bytesOf(env.PROJECT_QUOTA_MB);
    this.spoolFolder = join(this.dataDir, 'uploads');
    this.worker = env.WORKER;
    this.demo = env.DEMO === 'on';
    this.logLevel = env.LOG_LEVEL;
    this.logFormat = env.LOG_FORMAT;
    this.computeThreads = env.COMPUTE_THREADS;
    this.jobsAtOnce = 2 * env.COMPUTE_THREADS;
    this.adminEmail = env.ADMIN_EMAIL?.toLowerCase();
    this.adminPassword = env.ADMIN_PASSWORD;
    this.mail = { smtp: env.SMTP_URL ?? null, from: env.MAIL_FROM ?? usualSender(this.publicUrl) };
    this.storage = storageSettings(env, join(this.dataDir, 'storage'));
  }

  /** True when people reach the installation over TLS. */
  get isHttps(): boolean {
    return this.publicUrl.startsWith('https:');
  }
}

function bytesOf(mebibytes: number): number {
  return Math.floor(mebibytes * 1024 * 1024);
}

/** The address of the server itself; an IPv6 host stands in brackets (RFC 3986, 3.2.2). */
function ownAddress(host: string, port: number): string {
  return `http://${host.includes(':') ? `[${host}]` : host}:${port}`;
}
