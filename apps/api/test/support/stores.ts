import { startFakeS3 } from './fake-s3.js';

/** Where an installation keeps its files, as its environment names it. */
export interface Store {
  environment: Record<string, string>;
  stop(): Promise<void>;
}

/** Files in the data folder. */
export function startDisk(): Promise<Store> {
  return Promise.resolve({ environment: {}, stop: () => Promise.resolve() });
}

/** Files in a bucket of a store that lives in memory, on loopback. */
export async function startBucket(): Promise<Store> {
  const { settings, stop } = await startFakeS3();
  const environment = {
    STORAGE: 's3',
    S3_ENDPOINT: settings.endpoint,
    S3_BUCKET: settings.bucket,
    S3_REGION: settings.region,
    S3_ACCESS_KEY_ID: settings.accessKeyId,
    S3_SECRET_ACCESS_KEY: settings.secretAccessKey,
    S3_FORCE_PATH_STYLE: 'on',
  };
  return { environment, stop };
}

export const stores: [string, () => Promise<Store>][] = [
  ['disk', startDisk],
  ['s3', startBucket],
];
