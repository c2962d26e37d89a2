import { Text } from '@chakra-ui/react';
import type { Recording } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { ConfirmDialog } from '../../../components/confirm-dialog.js';
import { formatBytes } from '../../../lib/format.js';
import { ImportBench } from '../bench/import-bench.js';
import { useImportBench } from '../bench/use-import-bench.js';
import { uploadLimitsQuery } from '../api/upload-limits.js';
import { useUnfinishedUploads } from '../hooks/use-unfinished-uploads.js';
import { useUploadQueue } from '../hooks/use-upload-queue.js';
import { ImportDialog } from '../import/import-dialog.js';
import { DropZone } from './drop-zone.js';
import { UploadList } from './upload-list.js';
import { percentOf } from './upload-words.js';
import { useIntake } from './use-intake.js';

interface IntakeProps {
  projectId: string;
  recordingTo: (recordingId: string) => string;
  onRemoveCopy: (recording: Recording) => void;
}

/** The way in for captures: drop zone, import form where there are doubts, and the uploads. */
export function Intake({ projectId, recordingTo, onRemoveCopy }: IntakeProps) {
  const { queue, items } = useUploadQueue(projectId);
  const [checkFirst, setCheckFirst] = useState(false);
  const bench = useImportBench(projectId);
  const intake = useIntake(projectId, queue, checkFirst, bench.data);
  const unfinished = useUnfinishedUploads(projectId, items);
  const limits = useQuery(uploadLimitsQuery(projectId));
  const inQuestion = items.find(({ state }) => state === 'asking');
  const { unconfirmed } = intake;
  const { inDoubt } = unfinished;
  return (
    <>
      <ImportBench projectId={projectId} bench={bench} />
      <DropZone
        onFiles={intake.drop}
        maxFileBytes={limits.data?.maxFileBytes ?? null}
        checkFirst={checkFirst}
        onCheckFirst={setCheckFirst}
      />
      <UploadList
        queue={queue}
        items={items}
        unfinished={unfinished.uploads}
        recordingTo={recordingTo}
        onDiscard={unfinished.askToDiscard}
        onRemoveCopy={(item) => {
          const recording = item.outcome?.items[0];
          if (!recording) return;
          queue.forget(item.id);
          onRemoveCopy(recording);
        }}
      />
      {inQuestion ? (
        <ImportDialog
          key={inQuestion.id}
          open
          projectId={projectId}
          source={{ kind: 'file', file: inQuestion.file }}
          onClose={() => queue.leaveOut(inQuestion.id)}
          onRead={(options, readingRuleId) =>
            queue.send(inQuestion.id, { ...bench.data, import: options, readingRuleId })
          }
        />
      ) : null}
      <ConfirmDialog
        open={unconfirmed.length > 0}
        onClose={intake.dismiss}
        title={`Add ${unconfirmed.length} files?`}
        confirmLabel={`Add ${unconfirmed.length} files`}
        onConfirm={intake.confirm}
      >
        <Text>
          {formatBytes(unconfirmed.reduce((sum, { file }) => sum + file.size, 0))} together. Each becomes a
          recording of its own.
        </Text>
      </ConfirmDialog>
      <ConfirmDialog
        open={inDoubt !== null}
        onClose={unfinished.keep}
        title={`Discard what arrived of ${inDoubt?.fileName ?? ''}?`}
        confirmLabel="Discard"
        onConfirm={unfinished.discard}
        pending={unfinished.pending}
        destructive
      >
        {inDoubt ? (
          <Text>
            {formatBytes(inDoubt.receivedBytes)} (
            {percentOf(inDoubt.receivedBytes / Math.max(1, inDoubt.sizeBytes))}) are dropped on the server;
            the file on your computer stays. This cannot be taken back.
          </Text>
        ) : null}
      </ConfirmDialog>
    </>
  );
}
