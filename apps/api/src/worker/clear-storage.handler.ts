import { Inject, Injectable, Logger } from '@nestjs/common';
import type { Database } from '@overtally/db';
import type { z } from 'zod';
import { DATABASE } from '../database/database.tokens.js';
import { clearStorageJob } from '../jobs/definitions/clear-storage.job.js';
import type { JobContext, JobHandler } from '../jobs/job-handler.js';
import { RecordingsService } from '../recordings/recordings.service.js';
import { Storage, type StoredObject } from '../storage/storage.js';
import { isSourceKey, keyPrefixes, referredKeys } from './referred-keys.js';

type Payload = z.infer<typeof clearStorageJob.payload>;

/** What is younger may belong to a change that is not committed yet. */
const orphanAfterMs = 24 * 3600 * 1000;
const objectsAtOnce = 1000;

/** Removes objects that no row refers to, as a process leaves them that ended between storing and committing. */
@Injectable()
export class ClearStorageHandler implements JobHandler<Payload> {
  readonly definition = clearStorageJob;
  private readonly logger = new Logger('Storage');

  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly storage: Storage,
    private readonly recordings: RecordingsService,
  ) {}

  async run(_payload: Payload, { signal }: JobContext): Promise<void> {
    await this.removeOrphans(Date.now(), signal);
  }

  /** Nothing waits for this job, and the next one does the same. */
  giveUp(): Promise<void> {
    return Promise.resolve();
  }

  /**
   * Removes the orphans that were written a day or more before `now`. Where no object at all is referred to, the database
   * is rather another one than that of this store: nothing is removed then.
   * @returns how many were removed
   */
  async removeOrphans(now: number, signal: AbortSignal): Promise<number> {
    const orphans: string[] = [];
    let referred = 0;
    for await (const objects of this.lots()) {
      signal.throwIfAborted();
      const inUse = await referredKeys(
        this.database,
        objects.map(({ key }) => key),
      );
      const unused = objects.filter(({ key }) => !inUse.has(key));
      orphans.push(
        ...unused.filter(({ writtenAt }) => now - writtenAt >= orphanAfterMs).map(({ key }) => key),
      );
      referred += objects.length - unused.length;
    }
    if (orphans.length === 0) return 0;
    if (referred === 0) {
      const text = 'The database refers to none of the stored objects; is it the one that belongs to them?';
      this.logger.warn({ objects: orphans.length }, `${text} Nothing was removed`);
      return 0;
    }
    for (const key of orphans) {
      signal.throwIfAborted();
      if (isSourceKey(key)) await this.recordings.deleteUnusedSource(key);
      else await this.storage.delete(key);
    }
    this.logger.log({ objects: orphans.length }, 'Stored objects that nothing referred to were removed');
    return orphans.length;
  }

  /** All objects, in lots. */
  private async *lots(): AsyncIterable<StoredObject[]> {
    let lot: StoredObject[] = [];
    for (const prefix of keyPrefixes) {
      for await (const object of this.storage.list(prefix)) {
        lot.push(object);
        if (lot.length < objectsAtOnce) continue;
        yield lot;
        lot = [];
      }
    }
    if (lot.length > 0) yield lot;
  }
}
