import type { Request } from 'express';
import type { StorageEngine } from 'multer';
import type { Readable } from 'node:stream';
import { problem } from '../../common/problem.js';
import type { StagedObject, Storage } from '../../storage/storage.js';
import { peeked } from './archives/peeked.js';
import { isZip, zipHeadBytes } from './is-zip.js';

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
      .stage(unlessArchive(file.stream))
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

/** @throws ProblemException 400 `archive` once the first bytes tell that they are those of a ZIP archive */
async function* unlessArchive(stream: Readable): AsyncGenerator<Uint8Array> {
  const { head, whole } = await peeked(bytesOf(stream), zipHeadBytes);
  try {
    if (isZip(head)) throw isArchive();
    yield* whole;
  } finally {
    await whole.return(undefined);
  }
}

async function* bytesOf(stream: Readable): AsyncGenerator<Uint8Array> {
  yield* stream as AsyncIterable<Uint8Array>;
}

function isArchive() {
  const message =
    'The file is a ZIP archive, or a document in the form of one. Send an archive of captures to the route that ends in /archives, and save a sheet as CSV';
  return problem(400, 'archive', message, [{ path: 'file', message: 'This is a ZIP archive' }]);
}
