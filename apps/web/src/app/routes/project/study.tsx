import { holds, type Study } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { useNavigate, useParams, useSearchParams } from 'react-router-dom';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { limitSetsQuery } from '../../../features/limits/api/list-limit-sets.js';
import { useProject } from '../../../features/projects/hooks/use-project.js';
import { studyQuery } from '../../../features/studies/api/get-study.js';
import { ComparisonPart } from '../../../features/studies/components/comparison-part.js';
import { StudyMenu } from '../../../features/studies/components/study-menu.js';
import { StudyPage } from '../../../features/studies/components/study-page.js';
import { VersionList } from '../../../features/studies/components/version-list.js';
import { paths } from '../../paths.js';
import { useProjectId } from '../../use-project-id.js';
import { useStudySlots } from './use-study-slots.js';

export function Component() {
  const project = useProject(useProjectId());
  const { studyId = '' } = useParams();
  const [search] = useSearchParams();
  const version = search.get('version');
  const study = useQuery(studyQuery(studyId, version === null ? null : Number(version)));
  const limitSets = useQuery(limitSetsQuery(project.id));
  const error = study.error ?? limitSets.error;
  if (error) return <ErrorState error={error} onRetry={() => void study.refetch()} />;
  if (!study.data || !limitSets.data) return <LoadingState label="Loading the study" />;
  return <SavedStudy key={study.data.versionId} study={study.data} limitSets={limitSets.data} />;
}

function SavedStudy({ study, limitSets }: { study: Study; limitSets: Parameters<typeof useStudySlots>[2] }) {
  const project = useProject(useProjectId());
  const navigate = useNavigate();
  const { slots, analysed } = useStudySlots(project.id, study.definition.input, limitSets);
  const mayWrite = holds('study.write', project.role);
  return (
    <StudyPage
      study={study}
      definition={study.definition}
      series={study.series}
      limitSets={limitSets}
      projectId={project.id}
      projectName={project.name}
      mayWrite={mayWrite}
      slots={{ ...slots, comparison: <ComparisonPart study={study} recordings={analysed} /> }}
      versions={
        <>
          <VersionList study={study} versionTo={(version) => paths.study(project.id, study.id, version)} />
          {mayWrite ? (
            <StudyMenu study={study} onDeleted={() => void navigate(paths.studies(project.id))} />
          ) : null}
        </>
      }
      onSaved={({ id }) => void navigate(paths.study(project.id, id))}
    />
  );
}
