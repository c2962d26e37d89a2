import { useState } from 'react';
import { notifyProblem } from '../../../components/notify.js';
import { previewImport } from '../api/preview-import.js';
import type { IncomingFile, Reading, UploadItem } from '../upload-item.js';
import type { UploadQueue } from '../upload-queue.js';
import { joinHalves, otherHalf, pairKey } from './comtrade-halves.js';
import { incomingFiles } from './incoming-files.js';

/** From so many files on it is asked whether all of them are meant. */
const manyFiles = 50;

/**
 * Takes dropped files in: a file whose layout is plain is sent at once, one that leaves doubts waits for the
 * import form.
 * @param said what goes with every capture
 */
export function useIntake(projectId: string, queue: UploadQueue, checkFirst: boolean, said: Reading = {}) {
  const [unconfirmed, setUnconfirmed] = useState<readonly IncomingFile[]>([]);

  async function drop(dropped: readonly File[]): Promise<void> {
    const incoming = incomingFiles(dropped);
    if (incoming.length === 0)
      return notifyProblem('Nothing was added', new Error('There is no file in it, or hidden ones alone.'));
    const held = queue.snapshot().filter(isLoneHalf);
    const { files, used } = await joinHalves(incoming, held);
    for (const { id } of used) queue.forget(id);
    if (files.length > manyFiles) setUnconfirmed(files);
    else await admit(files);
  }

  async function admit(files: readonly IncomingFile[]): Promise<void> {
    setUnconfirmed([]);
    for (const item of await queue.add(files)) await lookInto(item, files.length > 1);
  }

  async function lookInto({ id, file, reason }: UploadItem, amongOthers: boolean): Promise<void> {
    if (reason) return queue.leaveOut(id, reason);
    if (await isArchive(file)) return queue.send(id, said);
    if (checkFirst) return queue.ask(id);
    try {
      const { confident, problem, format } = await previewImport(projectId, file, null);
      if (problem?.code === 'comtrade-half')
        return queue.leaveOut(id, `${otherHalf(file.name)} belongs to it: drop both together`);
      if (problem && format === null && amongOthers) return queue.leaveOut(id, problem.message);
      if (!confident || problem) return queue.ask(id);
    } catch (error) {
      notifyProblem(`${file.name} could not be looked into first; it is sent as it is`, error);
    }
    queue.send(id, said);
  }

  return {
    /** Files that are too many to be taken in without asking; empty when there is nothing to ask. */
    unconfirmed,
    confirm: () => void admit(unconfirmed),
    dismiss: () => setUnconfirmed([]),
    drop: (files: readonly File[]) =>
      void drop(files).catch((error: unknown) => notifyProblem('The files could not be taken in', error)),
  };
}

/** A half of a COMTRADE record that was left out and waits for the other one. */
const isLoneHalf = ({ state, path }: UploadItem): boolean => state === 'left-out' && pairKey(path) !== null;

/** ZIP archives begin with a member (PKWARE APPNOTE, 4.3.7); the server unpacks them. */
async function isArchive(file: File): Promise<boolean> {
  const [p, k, three, four] = new Uint8Array(await file.slice(0, 4).arrayBuffer());
  return p === 0x50 && k === 0x4b && three === 3 && four === 4;
}
