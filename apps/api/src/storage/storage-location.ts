import { DiskStorage } from './disk-storage.js';
import type { Storage } from './storage.js';

/** Names a store in plain data, so that a worker thread can open the same one. */
export interface StorageLocation {
  kind: 'disk';
  folder: string;
}

/** Opens the store at `location`. */
export function openStorage(location: StorageLocation): Storage {
  return new DiskStorage(location.folder);
}
