import type { UploadLimits, UploadOutcome } from '@overtally/contracts';
import { finishUpload } from './api/upload-finish.js';
import { dropUpload, isPassing, transferFile, uploadIdOf } from './api/upload-transfer.js';
import {
  isOpen,
  isRunning,
  isUndecided,
  mayPause,
  mayResume,
  mayStop,
  type IncomingFile,
  type Reading,
  type UploadItem,
} from './upload-item.js';
import { findEarlierUpload } from './upload/earlier-upload.js';
import { refusalOf } from './upload/refusal.js';
import { SpeedMeter } from './upload/speed-meter.js';
import { untilOnline } from './upload/until-online.js';

/** What the queue needs of the page it lives in. */
export interface QueueSurroundings {
  /** Bounds of the project; null where they cannot be asked for now. */
  limits: () => Promise<UploadLimits | null>;
  /** SHA-256 of a file. */
  digest: (file: File, signal: AbortSignal) => Promise<string>;
  onArrived: (outcome: UploadOutcome) => void;
  /** Called when the server's list of unfinished uploads may have changed. */
  onUnfinished: () => void;
}

/** Uploads sent at the same time. */
const lanes = 2;
/** Milliseconds between two reports of a progress. */
const reportEvery = 100;

/**
 * Uploads of one project, two at a time in the order they were released. Lives outside the components, so that
 * uploads go on while people look at other pages.
 */
export class UploadQueue {
  private items: readonly UploadItem[] = [];
  private readonly runs = new Map<number, AbortController>();
  private readonly digests = new Map<number, { stop: AbortController; sha256: Promise<string> }>();
  private readonly listeners = new Set<() => void>();
  private nextId = 1;

  constructor(
    private readonly projectId: string,
    private readonly around: QueueSurroundings,
  ) {}

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  readonly snapshot = (): readonly UploadItem[] => this.items;

  /** Puts files on the list. They wait for `send`, but for those that the project cannot take. */
  async add(files: readonly IncomingFile[]): Promise<UploadItem[]> {
    const added = files.map((incoming) => newItem(this.nextId++, incoming));
    this.change([...this.items, ...added]);
    let limits: UploadLimits | null;
    try {
      limits = await this.around.limits();
    } catch (error) {
      for (const { id } of added) this.patch(id, { state: 'failed', error });
      return [];
    }
    let ahead = this.items
      .filter((item) => isOpen(item) && !added.some(({ id }) => id === item.id))
      .reduce((sum, item) => sum + item.file.size, 0);
    for (const { id, file } of added) {
      const error = limits ? refusalOf(file, limits, ahead) : null;
      if (error) this.patch(id, { state: 'failed', error });
      else ahead += file.size;
    }
    return added.flatMap(({ id }) => this.find(id) ?? []).filter(({ state }) => state === 'looking');
  }

  /** Lets a file go that was looked into. Without a `reading`, the server decides how it is read. */
  send(id: number, reading: Reading = {}): void {
    const item = this.find(id);
    if (!item || !isUndecided(item)) return;
    this.patch(id, { state: 'waiting', reading });
    this.fillLanes();
  }

  /** Keeps a file on the list that is not sent, so that it does not vanish without a trace. */
  leaveOut(id: number, reason: string | null = null): void {
    const item = this.find(id);
    if (item && isUndecided(item)) this.patch(id, { state: 'left-out', reason });
  }

  /** Has people asked how a file is to be read, also one that was left out. */
  ask(id: number): void {
    const item = this.find(id);
    if (item && (isUndecided(item) || item.state === 'left-out'))
      this.patch(id, { state: 'asking', reason: null });
  }

  /** Holds an upload; what arrived stays on the server. */
  pause(id: number): void {
    const item = this.find(id);
    if (!item || !mayPause(item)) return;
    this.patch(id, { state: 'paused', speed: null, error: null });
    this.runs.get(id)?.abort();
    this.fillLanes();
  }

  /** Lets a paused upload go on, or sends one that ended without a recording again. */
  resume(id: number): void {
    const item = this.find(id);
    if (!item || !mayResume(item)) return;
    this.patch(id, { state: 'waiting', error: null });
    this.fillLanes();
  }

  pauseAll(): void {
    for (const { id } of this.waitingFirst()) this.pause(id);
  }

  resumeAll(): void {
    for (const { id, state } of this.items) if (state === 'paused') this.resume(id);
  }

  /** Ends an upload; the server drops what it has of it. */
  stop(id: number): void {
    const item = this.find(id);
    if (!item || !mayStop(item)) return;
    this.patch(id, { state: 'stopped', speed: null, error: null });
    this.runs.get(id)?.abort();
    this.dropDigest(id);
    if (item.url) void this.dropFromServer(id, item.url);
    this.fillLanes();
  }

  stopAll(): void {
    for (const { id } of this.waitingFirst()) this.stop(id);
  }

  /** Takes one that has ended off the list. */
  forget(id: number): void {
    this.change(this.items.filter((item) => item.id !== id || isOpen(item)));
    this.around.onUnfinished();
  }

  /** Takes all that have ended off the list. */
  clear(): void {
    this.change(this.items.filter(isOpen));
    this.around.onUnfinished();
  }

  private fillLanes(): void {
    const free = lanes - this.items.filter(isRunning).length;
    const next = this.items.filter((item) => item.state === 'waiting').slice(0, Math.max(0, free));
    for (const item of next) void this.run(item);
  }

  private async run(item: UploadItem): Promise<void> {
    const { id } = item;
    const run = new AbortController();
    this.runs.set(id, run);
    this.patch(id, { state: 'sending', error: null });
    try {
      const outcome = await this.bringOver(item, run.signal);
      this.patch(id, { state: 'done', speed: null, sentBytes: item.file.size, outcome });
      this.around.onArrived(outcome);
      this.dropDigest(id);
    } catch (error) {
      // Pausing and stopping have said themselves how the item stands.
      if (run.signal.aborted) return;
      this.patch(id, { state: 'failed', speed: null, error });
      this.dropDigest(id);
      this.around.onUnfinished();
    } finally {
      if (this.runs.get(id) === run) this.runs.delete(id);
      this.fillLanes();
    }
  }

  private async bringOver({ id, file, reading }: UploadItem, signal: AbortSignal): Promise<UploadOutcome> {
    const digest = this.digestOf(id, file);
    const url = await this.persist(id, signal, () => this.transfer(id, file, signal));
    this.patch(id, { state: 'finishing', url, sentBytes: file.size, speed: null, error: null });
    const sha256 = await digest;
    this.patch(id, { sha256 });
    const finish = { sha256, ...reading };
    return this.persist(id, signal, () => {
      this.patch(id, { state: 'finishing', error: null });
      return finishUpload(this.projectId, uploadIdOf(url), finish, signal);
    });
  }

  private async transfer(id: number, file: File, signal: AbortSignal): Promise<string> {
    const url = await this.whereToGoOn(id, file);
    signal.throwIfAborted();
    this.patch(id, { url });
    const meter = new SpeedMeter();
    let reportedAt = -Infinity;
    return transferFile(this.projectId, {
      ...{ file, url, signal },
      onUrl: (address) => this.patch(id, { url: address }),
      onProgress: (sentBytes) => {
        const now = performance.now();
        const speed = meter.take(now / 1000, sentBytes);
        if (now - reportedAt < reportEvery) return;
        reportedAt = now;
        this.patch(id, { state: 'sending', sentBytes, speed, error: null });
      },
      onTrouble: (error) => this.patch(id, { state: 'interrupted', speed: null, error }),
    });
  }

  private async whereToGoOn(id: number, file: File): Promise<string | null> {
    const known = this.find(id)?.url;
    if (known) return known;
    const earlier = await findEarlierUpload(this.projectId, file, this.takenIds());
    return earlier && this.takenIds().has(uploadIdOf(earlier)) ? null : earlier;
  }

  /** Does it again for as long as only the connection or a busy server is in the way. */
  private async persist<T>(id: number, signal: AbortSignal, act: () => Promise<T>): Promise<T> {
    for (;;) {
      try {
        return await act();
      } catch (error) {
        if (signal.aborted || !isPassing(error)) throw error;
        this.patch(id, { state: 'interrupted', speed: null, error });
        await untilOnline(signal, error.retryAfterS);
      }
    }
  }

  private digestOf(id: number, file: File): Promise<string> {
    const known = this.digests.get(id);
    if (known) return known.sha256;
    const stop = new AbortController();
    const sha256 = this.around.digest(file, stop.signal);
    // Nobody may be waiting yet when it fails; who waits later is told all the same.
    sha256.catch(() => undefined);
    this.digests.set(id, { stop, sha256 });
    return sha256;
  }

  private dropDigest(id: number): void {
    this.digests.get(id)?.stop.abort();
    this.digests.delete(id);
  }

  private async dropFromServer(id: number, url: string): Promise<void> {
    try {
      await dropUpload(url);
      this.patch(id, { url: null, sentBytes: 0 });
    } catch (error) {
      this.patch(id, { error });
    }
    this.around.onUnfinished();
  }

  private takenIds(): ReadonlySet<string> {
    return new Set(
      this.items.flatMap(({ url, state }) => (url && state !== 'done' ? [uploadIdOf(url)] : [])),
    );
  }

  /** The items in an order in which ending one gives its place to none that is to end too. */
  private waitingFirst(): UploadItem[] {
    return this.items.toSorted((a, b) => Number(isRunning(a)) - Number(isRunning(b)));
  }

  private find(id: number): UploadItem | undefined {
    return this.items.find((item) => item.id === id);
  }

  private patch(id: number, change: Partial<UploadItem>): void {
    this.change(this.items.map((item) => (item.id === id ? { ...item, ...change } : item)));
  }

  private change(items: readonly UploadItem[]): void {
    this.items = items;
    for (const listener of this.listeners) listener();
  }
}

const newItem = (id: number, incoming: IncomingFile): UploadItem => ({
  ...{ reason: null, ...incoming },
  ...{ id, reading: {}, state: 'looking', sentBytes: 0, speed: null, url: null },
  ...{ sha256: null, outcome: null, error: null },
});
