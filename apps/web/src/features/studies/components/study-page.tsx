import type { LimitSet, Study, StudyDefinition } from '@overtally/contracts';
import type { FourierSeries } from '@overtally/dsp';
import { useState, type ReactNode } from 'react';
import { PageHeader } from '../../../components/page-header.js';
import { createStudyStore, StudyContext } from '../study-store.js';
import { draftOf } from '../draft.js';
import { SaveParts } from './save-parts.js';
import { StudyDesk, type StudySlots } from './study-desk.js';

interface StudyPageProps {
  /** Null for a new one. */
  study: Study | null;
  projectId: string;
  projectName: string;
  definition: StudyDefinition;
  series: FourierSeries;
  limitSets: readonly LimitSet[];
  mayWrite: boolean;
  slots: StudySlots;
  /** Goes to a study that was saved, or to one of its versions. */
  onSaved: (study: Study) => void;
  /** Versions of a saved study, and what else can be done with it. */
  versions?: ReactNode;
}

/** A study, saved or new. Mounted anew for each version, so that its draft begins with it. */
export function StudyPage(props: StudyPageProps) {
  const { study, definition, series, limitSets, projectName, mayWrite, slots, versions } = props;
  const [store] = useState(() => createStudyStore(draftOf(definition, series), limitSets));
  const isEarlier = study !== null && study.version !== (study.versions[0]?.version ?? study.version);
  const title = study?.name ?? 'New study';
  return (
    <StudyContext value={store}>
      <PageHeader
        title={title}
        subtitle={
          study
            ? `${study.number}, version ${study.version}${isEarlier ? ', an earlier one: to read, not to change' : ''}${study.retiredAt ? ', retired' : ''}`
            : 'Predicts what stages make of a signal; nothing is stored until you save it'
        }
        crumb={study?.number ?? 'New study'}
        documentTitle={`${title}, ${projectName}`}
        actions={
          <>
            {versions}
            {mayWrite && !isEarlier ? (
              <SaveParts study={study} projectId={props.projectId} onSaved={props.onSaved} />
            ) : null}
          </>
        }
      />
      <StudyDesk slots={slots} readOnly={isEarlier} />
    </StudyContext>
  );
}
