import { Button, Stack } from '@chakra-ui/react';
import type { LimitSet } from '@overtally/contracts';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { apiUrl } from '../../../lib/http.js';
import { CloneLimitSetDialog } from './clone-limit-set-dialog.js';
import { DeleteLimitSet } from './delete-limit-set.js';
import { RetireLimitSet } from './retire-limit-set.js';

interface LimitSetActionsProps {
  projectId: string;
  set: LimitSet;
  mayWrite: boolean;
  newVersionTo: string;
  onCloned: (set: LimitSet) => void;
  onDeleted: () => void;
}

/** What can be done with a set: published ones are copied, those of the project changed by new versions. */
export function LimitSetActions(props: LimitSetActionsProps) {
  const { projectId, set, mayWrite, newVersionTo, onCloned, onDeleted } = props;
  const [cloning, setCloning] = useState(false);
  const isOwn = set.projectId === projectId && mayWrite;
  const isNewest = set.newestId === undefined;
  return (
    <Stack direction="row" gap="2" wrap="wrap">
      {set.rows?.length ? null : (
        <Button asChild>
          <a
            href={apiUrl(`/limit-sets/${encodeURIComponent(set.id)}/table.csv`)}
            download={`${set.title}.csv`}
          >
            Download CSV
          </a>
        </Button>
      )}
      {mayWrite ? <Button onClick={() => setCloning(true)}>Copy</Button> : null}
      {isOwn ? <RetireLimitSet set={set} /> : null}
      {isOwn ? <DeleteLimitSet set={set} onDeleted={onDeleted} /> : null}
      {isOwn && isNewest ? (
        <Button asChild variant="solid">
          <Link to={newVersionTo}>New version</Link>
        </Button>
      ) : null}
      {cloning ? (
        <CloneLimitSetDialog
          projectId={projectId}
          set={set}
          onClose={() => setCloning(false)}
          onCloned={(made) => {
            setCloning(false);
            onCloned(made);
          }}
        />
      ) : null}
    </Stack>
  );
}
