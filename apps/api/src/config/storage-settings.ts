import type { Environment } from './environment.js';

/** Where files lie, in plain data, so that a worker thread can open the same store. */
export type StorageSettings = DiskSettings | S3Settings;

export interface DiskSettings {
  kind: 'disk';
  /** Absolute path. */
  folder: string;
}

/** A bucket of a store that speaks the protocol of S3. */
export interface S3Settings {
  kind: 's3';
  endpoint: string;
  bucket: string;
  region: string;
  accessKeyId: string;
  secretAccessKey: string;
  /** Whether the bucket stands in the path of an address rather than in its host name. */
  forcePathStyle: boolean;
}

/** What `STORAGE=s3` cannot do without. */
export const s3Variables = [
  'S3_ENDPOINT',
  'S3_BUCKET',
  'S3_REGION',
  'S3_ACCESS_KEY_ID',
  'S3_SECRET_ACCESS_KEY',
] as const;

/** @param folder that of the disk store */
export function storageSettings(env: Environment, folder: string): StorageSettings {
  if (env.STORAGE === 'disk') return { kind: 'disk', folder };
  const given = (name: (typeof s3Variables)[number]): string => {
    const value = env[name];
    if (value === undefined) throw new Error(`${name} is missing`);
    return value;
  };
  return {
    kind: 's3',
    endpoint: given('S3_ENDPOINT'),
    bucket: given('S3_BUCKET'),
    region: given('S3_REGION'),
    accessKeyId: given('S3_ACCESS_KEY_ID'),
    secretAccessKey: given('S3_SECRET_ACCESS_KEY'),
    forcePathStyle: env.S3_FORCE_PATH_STYLE === 'on',
  };
}
