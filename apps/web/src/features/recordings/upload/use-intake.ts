import { useState } from 'react';
import { notifyProblem } from '../../../components/notify.js';
import { previewImport } from '../api/preview-import.js';
import type { UploadQueue } from '../upload-queue.js';

/**
 * Takes dropped files in: a file whose layout is plain is sent at once, one that leaves doubts waits for the
 * import form.
 */
export function useIntake(projectId: string, queue: UploadQueue) {
  const [waiting, setWaiting] = useState<readonly File[]>([]);
  const hold = (file: File) => setWaiting((before) => [...before, file]);
  const release = () => setWaiting((before) => before.slice(1));

  async function takeOne(file: File, checkFirst: boolean): Promise<void> {
    if (checkFirst) return hold(file);
    try {
      const preview = await previewImport(projectId, file, null);
      if (!preview.confident || preview.problem) return hold(file);
    } catch (error) {
      notifyProblem(`${file.name} could not be looked into first; it is sent as it is`, error);
    }
    queue.add([{ file, options: {} }]);
  }

  return {
    /** The file whose settings are asked for now. */
    inQuestion: waiting[0] ?? null,
    take: (files: readonly File[], checkFirst: boolean) =>
      files.reduce<Promise<void>>(
        (before, file) => before.then(() => takeOne(file, checkFirst)),
        Promise.resolve(),
      ),
    release,
    hold,
  };
}
