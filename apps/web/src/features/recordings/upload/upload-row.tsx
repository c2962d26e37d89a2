import { Button } from '@chakra-ui/react';
import { ApiProblem } from '../../../lib/api-problem.js';
import { mayPause, mayStop, type UploadItem } from '../upload-item.js';
import type { UploadQueue } from '../upload-queue.js';
import { RowGrid } from './row-grid.js';
import { UploadStanding } from './upload-standing.js';

interface UploadRowProps {
  item: UploadItem;
  queue: UploadQueue;
  recordingTo: (recordingId: string) => string;
  onRemoveCopy: (item: UploadItem) => void;
}

/** One upload of the list. */
export function UploadRow({ item, queue, recordingTo, onRemoveCopy }: UploadRowProps) {
  return (
    <RowGrid
      name={item.file.name}
      origin={originOf(item)}
      sizeBytes={item.file.size}
      actions={<Actions item={item} queue={queue} onRemoveCopy={onRemoveCopy} />}
    >
      <UploadStanding item={item} recordingTo={recordingTo} />
    </RowGrid>
  );
}

/** "cabinet 3/monday", "of plant.cfg and plant.dat" */
function originOf({ path, file, madeOf }: UploadItem): string | undefined {
  const folder = path.slice(0, Math.max(0, path.length - file.name.length - 1));
  const parts = madeOf ? `of ${madeOf.join(' and ')}` : '';
  return [folder, parts].filter(Boolean).join(', ') || undefined;
}

/** Files that cannot be sent as they are, whatever happens elsewhere. */
const hopeless = new Set(['file-too-large', 'file-unreadable']);

function Actions({ item, queue, onRemoveCopy }: Omit<UploadRowProps, 'recordingTo'>) {
  const { id, file, state, error, outcome } = item;
  const action = (label: string, spoken: string, act: () => void) => (
    <Button size="xs" aria-label={spoken} onClick={act}>
      {label}
    </Button>
  );
  const isHopeless = error instanceof ApiProblem && hopeless.has(error.code ?? '');
  const isCopy = outcome?.items.length === 1 && outcome.items[0]?.duplicateOf;
  return (
    <>
      {mayPause(item) ? action('Pause', `Pause ${file.name}`, () => queue.pause(id)) : null}
      {state === 'paused' ? action('Go on', `Go on with ${file.name}`, () => queue.resume(id)) : null}
      {mayStop(item) ? action('Stop', `Stop ${file.name}`, () => queue.stop(id)) : null}
      {state === 'left-out'
        ? action('Look again', `Look into ${file.name} again`, () => queue.ask(id))
        : null}
      {(state === 'failed' && !isHopeless) || state === 'stopped'
        ? action('Send again', `Send ${file.name} again`, () => queue.resume(id))
        : null}
      {isCopy ? action('Remove this copy', 'Remove this copy', () => onRemoveCopy(item)) : null}
    </>
  );
}
