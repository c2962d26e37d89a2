import type { ImportOptions, Recording } from '@overtally/contracts';
import { uploadRecording, type Upload } from './api/upload-recording.js';

export interface UploadItem {
  id: number;
  file: File;
  options: ImportOptions;
  state: 'waiting' | 'sending' | 'done' | 'failed' | 'stopped' | 'left-out';
  sentBytes: number;
  recording: Recording | null;
  error: unknown;
}

type Send = (projectId: string, upload: Upload) => Promise<Recording>;

/** Uploads sent at the same time. */
const lanes = 2;

/**
 * Uploads of one project, two at a time in the order they were added. Lives outside the components, so that
 * uploads go on while people look at other pages.
 */
export class UploadQueue {
  private items: readonly UploadItem[] = [];
  private readonly stops = new Map<number, AbortController>();
  private readonly listeners = new Set<() => void>();
  private nextId = 1;

  constructor(
    private readonly projectId: string,
    private readonly onArrived: (recording: Recording) => void,
    private readonly send: Send = uploadRecording,
  ) {}

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  readonly snapshot = (): readonly UploadItem[] => this.items;

  add(files: readonly { file: File; options: ImportOptions }[]): void {
    const added = files.map(({ file, options }) => this.item(file, options, 'waiting'));
    this.change([...this.items, ...added]);
    this.fillLanes();
  }

  /** Remembers a file that was looked into and not sent, so that it does not vanish without a trace. */
  leaveOut(file: File): void {
    this.change([...this.items, this.item(file, {}, 'left-out')]);
  }

  private item(file: File, options: ImportOptions, state: UploadItem['state']): UploadItem {
    return { id: this.nextId++, file, options, state, sentBytes: 0, recording: null, error: null };
  }

  /** Stops an upload that waits or is under way; the server drops what it has of it. */
  stop(id: number): void {
    this.stops.get(id)?.abort();
    this.patch(id, { state: 'stopped' });
    this.fillLanes();
  }

  stopAll(): void {
    for (const item of this.items) if (isOpen(item)) this.stop(item.id);
  }

  retry(id: number): void {
    this.patch(id, { state: 'waiting', sentBytes: 0, error: null });
    this.fillLanes();
  }

  /** Takes one that has ended off the list. */
  forget(id: number): void {
    this.change(this.items.filter((item) => item.id !== id || isOpen(item)));
  }

  /** Takes all that have ended off the list. */
  clear(): void {
    this.change(this.items.filter(isOpen));
  }

  private fillLanes(): void {
    const sending = this.items.filter((item) => item.state === 'sending').length;
    const next = this.items.filter((item) => item.state === 'waiting').slice(0, Math.max(0, lanes - sending));
    for (const item of next) void this.run(item);
  }

  private async run(item: UploadItem): Promise<void> {
    const stop = new AbortController();
    this.stops.set(item.id, stop);
    this.patch(item.id, { state: 'sending' });
    try {
      const recording = await this.send(this.projectId, {
        file: item.file,
        options: item.options,
        signal: stop.signal,
        onProgress: (sent, total) =>
          this.patch(item.id, { sentBytes: total > 0 ? (sent / total) * item.file.size : 0 }),
      });
      this.patch(item.id, { state: 'done', sentBytes: item.file.size, recording });
      this.onArrived(recording);
    } catch (error) {
      if (!stop.signal.aborted) this.patch(item.id, { state: 'failed', error });
    } finally {
      this.stops.delete(item.id);
      this.fillLanes();
    }
  }

  private patch(id: number, change: Partial<UploadItem>): void {
    this.change(this.items.map((item) => (item.id === id ? { ...item, ...change } : item)));
  }

  private change(items: readonly UploadItem[]): void {
    this.items = items;
    for (const listener of this.listeners) listener();
  }
}

/** True while an upload waits or is under way. */
export const isOpen = (item: UploadItem): boolean => item.state === 'waiting' || item.state === 'sending';
