import type { StorageSettings } from '../config/storage-settings.js';
import { DiskStorage } from './disk-storage.js';
import { S3Storage } from './s3-storage.js';
import type { Storage } from './storage.js';

/** Opens the store that the settings name. It must have been prepared once (`Storage.prepare`). */
export function openStorage(settings: StorageSettings): Storage {
  return settings.kind === 's3' ? new S3Storage(settings) : new DiskStorage(settings.folder);
}
