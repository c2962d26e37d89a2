import { holds, type Study } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { useNavigate, useParams, useSearchParams } from 'react-router-dom';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { limitSetsQuery } from '../../../features/limits/api/list-limit-sets.js';
import { useProject } from '../../../features/projects/hooks/use-project.js';
import { studyQuery } from '../../../features/studies/api/get-study.js';
import { StudyPage } from '../../../features/studies/components/study-page.js';
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
  const slots = useStudySlots(project.id, study.definition.input, limitSets);
  return (
    <StudyPage
      study={study}
      definition={study.definition}
      series={study.series}
      limitSets={limitSets}
      projectId={project.id}
      projectName={project.name}
      mayWrite={holds('study.write', project.role)}
      slots={slots}
      onSaved={({ id }) => void navigate(paths.study(project.id, id))}
    />
  );
}
