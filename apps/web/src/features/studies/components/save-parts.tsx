import { Button, Input, Stack, Text, Textarea } from '@chakra-ui/react';
import type { Study, StudyDefinition } from '@overtally/contracts';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useCallback, useEffect, useRef, useState } from 'react';
import { useBlocker } from 'react-router-dom';
import { ConfirmDialog } from '../../../components/confirm-dialog.js';
import { ErrorState } from '../../../components/error-state.js';
import { FormField } from '../../../components/form-field.js';
import { Modal } from '../../../components/modal.js';
import { notifyDone } from '../../../components/notify.js';
import { ApiProblem } from '../../../lib/api-problem.js';
import { createStudy, saveVersion } from '../api/write-study.js';
import { definitionOf } from '../draft.js';
import { useIsChanged, useStudyStore } from '../study-store.js';

interface SavePartsProps {
  study: Study | null;
  projectId: string;
  onSaved: (study: Study) => void;
}

/** Save buttons, their dialog, and the guard of what is not saved. */
export function SaveParts({ study, projectId, onSaved }: SavePartsProps) {
  const store = useStudyStore();
  const isChanged = useIsChanged();
  const [dialog, setDialog] = useState<'new' | 'version' | null>(null);
  // After saving, the page goes on to what was saved.
  const isLeaving = useRef(false);
  const isHeld = useCallback(() => isChanged && !isLeaving.current, [isChanged]);
  return (
    <>
      <LeaveGuard isHeld={isHeld} />
      {isChanged ? (
        <Text fontSize="13px" color="near">
          Not saved
        </Text>
      ) : null}
      {study ? (
        <>
          <Button onClick={() => setDialog('new')}>Keep as new study</Button>
          <Button variant="solid" disabled={!isChanged} onClick={() => setDialog('version')}>
            Save version
          </Button>
        </>
      ) : (
        <Button variant="solid" onClick={() => setDialog('new')}>
          Save study
        </Button>
      )}
      {dialog ? (
        <SaveDialog
          key={dialog}
          as={dialog}
          study={study}
          projectId={projectId}
          definition={() => definitionOf(store.draft())}
          onClose={() => setDialog(null)}
          onAsNew={() => setDialog('new')}
          onSaved={(saved) => {
            isLeaving.current = true;
            setDialog(null);
            onSaved(saved);
          }}
        />
      ) : null}
    </>
  );
}

interface SaveDialogProps {
  as: 'new' | 'version';
  study: Study | null;
  projectId: string;
  definition: () => StudyDefinition;
  onClose: () => void;
  onAsNew: () => void;
  onSaved: (study: Study) => void;
}

function SaveDialog({ as, study, projectId, definition, onClose, onAsNew, onSaved }: SaveDialogProps) {
  const queryClient = useQueryClient();
  const [name, setName] = useState(study ? `${study.name}, another` : '');
  const [comment, setComment] = useState('');
  const save = useMutation({
    mutationFn: () =>
      as === 'version' && study
        ? saveVersion(study.id, { definition: definition(), comment, basedOn: study.version })
        : createStudy(projectId, { name, definition: definition(), comment }),
    onSuccess: async (saved) => {
      await queryClient.invalidateQueries({ queryKey: ['projects', projectId, 'studies'] });
      await queryClient.invalidateQueries({ queryKey: ['studies', saved.id] });
      notifyDone(as === 'version' ? `Version ${saved.version} saved` : `${saved.number} saved`);
      onSaved(saved);
    },
  });
  const isStale = save.error instanceof ApiProblem && save.error.status === 409;
  return (
    <Modal
      open
      onClose={onClose}
      title={as === 'version' ? 'Save a new version' : 'Save as a study'}
      footer={
        <>
          <Button onClick={onClose}>Cancel</Button>
          <Button
            variant="solid"
            loading={save.isPending}
            disabled={as === 'new' && name.trim() === ''}
            onClick={() => save.mutate()}
          >
            Save
          </Button>
        </>
      }
    >
      <Stack gap="4">
        {as === 'new' ? (
          <FormField label="Name">
            <Input value={name} maxLength={160} onChange={(event) => setName(event.target.value)} />
          </FormField>
        ) : (
          <Text color="inkSoft">Version {study?.version} and all before it stay as they are.</Text>
        )}
        <FormField label={as === 'version' ? 'What is new' : 'Comment'} optional>
          <Textarea
            rows={2}
            maxLength={500}
            value={comment}
            onChange={(event) => setComment(event.target.value)}
          />
        </FormField>
        {isStale ? (
          <Stack gap="2" role="alert" borderLeftWidth="3px" borderColor="near" pl="3">
            <Text>
              Somebody saved another version meanwhile. What you have here is kept: save it as a new study, or
              look at the newest version in another tab first.
            </Text>
            <Stack direction="row" gap="2">
              <Button onClick={onAsNew}>Keep mine as new study</Button>
              <Button asChild>
                <a href={window.location.pathname} target="_blank" rel="noreferrer">
                  Open the newest version
                </a>
              </Button>
            </Stack>
          </Stack>
        ) : save.error ? (
          <ErrorState title="Not saved" error={save.error} />
        ) : null}
      </Stack>
    </Modal>
  );
}

/** Asks before the page is left with changes that are not saved. */
function LeaveGuard({ isHeld }: { isHeld: () => boolean }) {
  const blocker = useBlocker(isHeld);
  useEffect(() => {
    const warn = (event: BeforeUnloadEvent) => {
      if (isHeld()) event.preventDefault();
    };
    window.addEventListener('beforeunload', warn);
    return () => window.removeEventListener('beforeunload', warn);
  }, [isHeld]);
  return (
    <ConfirmDialog
      open={blocker.state === 'blocked'}
      title="Leave without saving?"
      confirmLabel="Leave"
      destructive
      onClose={() => blocker.reset?.()}
      onConfirm={() => blocker.proceed?.()}
    >
      What you changed in this study is not saved and will be lost.
    </ConfirmDialog>
  );
}
