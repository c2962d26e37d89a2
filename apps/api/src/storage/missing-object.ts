import { problem } from '../common/problem.js';
import { StorageObjectMissing } from './storage.js';

/** By name, since an error from a thread keeps its name but not its class. */
export function isMissingObject(error: unknown): boolean {
  return error instanceof Error && error.name === StorageObjectMissing.name;
}

/** Turns the lack of a stored object into an answer that says what is wrong with the installation. */
export async function present<T>(work: Promise<T>): Promise<T> {
  try {
    return await work;
  } catch (error) {
    if (!isMissingObject(error)) throw error;
    throw problem(500, 'stored-file-missing', 'A stored file is missing; have it restored from the backup');
  }
}
