import type { Request } from 'express';
import type { StorageEngine } from 'multer';
import type { StagedObject, Storage } from '../../storage/storage.js';

/** An uploaded file whose bytes are in storage and wait for their key. */
export type StagedFile = Express.Multer.File & { staged: StagedObject };

/** Streams an uploaded file into storage while it is hashed; it is never held whole in memory. */
export class StagingEngine implements StorageEngine {
  constructor(private readonly storage: Storage) {}

  _handleFile(
    request: Request,
    file: Express.Multer.File,
    done: (error?: unknown, info?: Partial<StagedFile>) => void,
  ): void {
    // A client that goes away leaves the part stream waiting for ever unless it is ended here.
    const end = () => {
      if (!request.complete) file.stream.destroy(new Error('The upload was broken off'));
    };
    request.once('close', end);
    this.storage
      .stage(file.stream)
      .finally(() => request.off('close', end))
      .then(
        (staged) => done(undefined, { staged, size: staged.size }),
        (error: unknown) => done(error),
      );
  }

  _removeFile(
    _request: Request,
    file: Express.Multer.File & Partial<StagedFile>,
    done: (error: Error | null) => void,
  ): void {
    Promise.resolve(file.staged?.discard()).then(
      () => done(null),
      (error: Error) => done(error),
    );
  }
}
