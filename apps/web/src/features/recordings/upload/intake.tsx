import type { Recording } from '@overtally/contracts';
import { useState } from 'react';
import { useUploadQueue } from '../hooks/use-upload-queue.js';
import { ImportDialog } from '../import/import-dialog.js';
import { DropZone } from './drop-zone.js';
import { UploadList } from './upload-list.js';
import { useIntake } from './use-intake.js';

interface IntakeProps {
  projectId: string;
  recordingTo: (recordingId: string) => string;
  onRemoveCopy: (recording: Recording) => void;
}

/** The way in for captures: drop zone, import form where there are doubts, and the uploads. */
export function Intake({ projectId, recordingTo, onRemoveCopy }: IntakeProps) {
  const { queue, items } = useUploadQueue(projectId);
  const intake = useIntake(projectId, queue);
  const [checkFirst, setCheckFirst] = useState(false);
  const { inQuestion } = intake;
  return (
    <>
      <DropZone
        onFiles={(files) => void intake.take(files, checkFirst)}
        checkFirst={checkFirst}
        onCheckFirst={setCheckFirst}
      />
      <UploadList
        queue={queue}
        items={items}
        recordingTo={recordingTo}
        onLookAgain={(item) => {
          queue.forget(item.id);
          intake.hold(item.file);
        }}
        onRemoveCopy={(item) => {
          if (!item.recording) return;
          queue.forget(item.id);
          onRemoveCopy(item.recording);
        }}
      />
      {inQuestion ? (
        <ImportDialog
          open
          projectId={projectId}
          source={{ kind: 'file', file: inQuestion }}
          onClose={() => {
            queue.leaveOut(inQuestion);
            intake.release();
          }}
          onRead={(options) => {
            queue.add([{ file: inQuestion, options }]);
            intake.release();
          }}
        />
      ) : null}
    </>
  );
}
