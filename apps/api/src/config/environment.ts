import { isIP } from 'node:net';
import { availableParallelism, platform } from 'node:os';
import { z } from 'zod';
import { senderSchema, smtpUrlSchema } from './mail-settings.js';
import { s3Variables } from './storage-settings.js';

const absent = (value: unknown) => (value === '' ? undefined : value);
const optional = <T extends z.ZodType>(schema: T) => z.preprocess(absent, schema.optional());

const RANGE_NAMES = ['loopback', 'linklocal', 'uniquelocal'];

function isAddressOrRange(text: string): boolean {
  if (RANGE_NAMES.includes(text)) return true;
  const [address = '', prefix = '0', ...rest] = text.split('/');
  const bits = { 4: 32, 6: 128 }[isIP(address) as 4 | 6] as number | undefined;
  return bits !== undefined && /^\d{1,3}$/.test(prefix) && Number(prefix) <= bits && rest.length === 0;
}

const isHopCount = (entries: string[]): boolean => entries.length === 1 && /^\d{1,2}$/.test(entries[0] ?? '');

/** Reverse proxies that are believed what they say of the caller: how many hops, or whose addresses. */
const trustProxySchema = z
  .string()
  .transform((text) => text.split(',').map((entry) => entry.trim()))
  .refine((entries) => isHopCount(entries) || entries.every(isAddressOrRange), {
    error: 'give the number of proxies in front, or their addresses such as 10.0.0.2, 172.18.0.0/16',
  })
  .transform((entries) => (isHopCount(entries) ? Number(entries[0]) : entries));

/** All processors where compute threads give way to the rest of the process (`lowerThreadPriority`), else all but one. */
const usualComputeThreads = (): number =>
  Math.max(1, availableParallelism() - (platform() === 'linux' ? 0 : 1));

/** Looked at together with the other faults, not after them. */
const neededByS3 = (name: (typeof s3Variables)[number]) =>
  z.refine<{ STORAGE: string } & Partial<Record<typeof name, string>>>(
    (env) => env.STORAGE !== 's3' || env[name] !== undefined,
    { path: [name], message: 'STORAGE=s3 needs it', when: () => true },
  );

/** The environment of a process. An empty value counts as absent. */
export const environmentSchema = z
  .object({
    PORT: z.preprocess(absent, z.coerce.number().int().min(0).max(65535).default(4310)),
    HOST: z.preprocess(absent, z.string().default('127.0.0.1')),
    DATABASE_URL: z.preprocess(
      absent,
      z.url({ protocol: /^postgres(ql)?$/, error: 'give a postgresql:// address' }),
    ),
    DATA_DIR: z.preprocess(absent, z.string({ error: 'give the folder that keeps uploaded files' })),
    WEB_DIST: optional(z.string()),
    SESSION_SECRET: z.preprocess(
      absent,
      z
        .string({ error: 'give a random text of at least 32 characters' })
        .min(32, 'use at least 32 characters'),
    ),
    PUBLIC_URL: optional(z.url({ protocol: /^https?$/, error: 'give an http:// or https:// address' })),
    TRUST_PROXY: optional(trustProxySchema),
    MAX_UPLOAD_MB: z.preprocess(absent, z.coerce.number().positive().default(8192)),
    PROJECT_QUOTA_MB: optional(z.coerce.number().positive()),
    WORKER: z.preprocess(absent, z.enum(['embedded', 'off']).default('embedded')),
    DEMO: z.preprocess(absent, z.enum(['on', 'off']).default('off')),
    LOG_LEVEL: z.preprocess(
      absent,
      z.enum(['fatal', 'error', 'warn', 'info', 'debug', 'trace', 'silent']).default('info'),
    ),
    LOG_FORMAT: z.preprocess(absent, z.enum(['json', 'pretty']).default('json')),
    COMPUTE_THREADS: z.preprocess(
      absent,
      z.coerce.number().int().min(1).max(256).default(usualComputeThreads),
    ),
    ADMIN_EMAIL: optional(z.email({ error: 'give an e-mail address' })),
    ADMIN_PASSWORD: optional(z.string().min(12, 'use at least 12 characters').max(256)),
    SMTP_URL: optional(smtpUrlSchema),
    MAIL_FROM: optional(senderSchema),
    STORAGE: z.preprocess(absent, z.enum(['disk', 's3']).default('disk')),
    S3_ENDPOINT: optional(z.url({ protocol: /^https?$/, error: 'give an http:// or https:// address' })),
    S3_BUCKET: optional(z.string()),
    S3_REGION: optional(z.string()),
    S3_ACCESS_KEY_ID: optional(z.string()),
    S3_SECRET_ACCESS_KEY: optional(z.string()),
    S3_FORCE_PATH_STYLE: z.preprocess(absent, z.enum(['on', 'off']).default('off')),
  })
  .check(...s3Variables.map(neededByS3))
  .refine((env) => (env.ADMIN_EMAIL === undefined) === (env.ADMIN_PASSWORD === undefined), {
    path: ['ADMIN_EMAIL'],
    message: 'give ADMIN_EMAIL and ADMIN_PASSWORD together, or neither',
    when: () => true,
  });

export type Environment = z.infer<typeof environmentSchema>;

/** The environment is unfit; `message` lists every fault, one a line. */
export class EnvironmentFaults extends Error {}

/**
 * Reads and checks the whole environment at once.
 * @throws EnvironmentFaults naming each variable and its fault; values are not repeated.
 */
export function readEnvironment(env: NodeJS.ProcessEnv = process.env): Environment {
  const parsed = environmentSchema.safeParse(env);
  if (parsed.success) return parsed.data;
  const lines = parsed.error.issues.map((issue) => `  ${issue.path.join('.')}: ${issue.message}`);
  throw new EnvironmentFaults(['The environment is not complete or not valid:', ...lines].join('\n'));
}
