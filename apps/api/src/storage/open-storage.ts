import type { StorageSettings } from '../config/storage-settings.js';
import { DiskStorage } from './disk-storage.js';
import type { Storage } from './storage.js';

/**
 * Opens the store that the settings name, which must have been prepared once (`Storage.prepare`). The driver of a bucket is
 * loaded only where it is wanted: it takes its time, in every thread that computes.
 */
export async function openStorage(settings: StorageSettings): Promise<Storage> {
  if (settings.kind === 'disk') return new DiskStorage(settings.folder);
  const { S3Storage } = await import('./s3-storage.js');
  return new S3Storage(settings);
}
