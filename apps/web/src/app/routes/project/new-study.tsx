import { holds, type Analysis, type StudyDefinition } from '@overtally/contracts';
import { textbookSeries, type FourierSeries } from '@overtally/dsp';
import { seriesOfChannel } from '@overtally/limits';
import { useQuery } from '@tanstack/react-query';
import { useNavigate, useSearchParams } from 'react-router-dom';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { limitSetsQuery } from '../../../features/limits/api/list-limit-sets.js';
import { useProject } from '../../../features/projects/hooks/use-project.js';
import { analysisQuery } from '../../../features/recordings/api/get-analysis.js';
import { firstWave } from '../../../features/studies/components/wave-input.js';
import { StudyPage } from '../../../features/studies/components/study-page.js';
import { emptyDefinition } from '../../../features/studies/draft.js';
import { paths } from '../../paths.js';
import { useProjectId } from '../../use-project-id.js';
import { useStudySlots } from './use-study-slots.js';

/** A new study, of the channel that the address names, or of a textbook wave. */
export function Component() {
  const project = useProject(useProjectId());
  const [search] = useSearchParams();
  const analysisId = search.get('analysis');
  const channel = Number(search.get('channel') ?? 0);
  const analysis = useQuery({ ...analysisQuery(analysisId ?? ''), enabled: analysisId !== null });
  const limitSets = useQuery(limitSetsQuery(project.id));
  const error = analysis.error ?? limitSets.error;
  if (error) return <ErrorState error={error} />;
  if (!limitSets.data || (analysisId !== null && !analysis.data)) {
    return <LoadingState label="Loading what the study starts from" />;
  }
  const begun = analysis.data ? ofChannel(analysis.data, channel) : ofWave();
  if (!begun) {
    return (
      <ErrorState
        title="Nothing to start from"
        error={
          new Error('No fundamental was found in this channel. Choose another channel or analyse it anew.')
        }
      />
    );
  }
  const fitting = limitSets.data.find(
    ({ id, quantity }) => id === project.comparisonLimitSetId && quantity === begun.definition.inputQuantity,
  );
  const definition: StudyDefinition = fitting
    ? {
        ...begun.definition,
        judgement: {
          ...{ limitSetId: fitting.id, parameters: {}, decisionRule: 'simple-acceptance', of: 'both' },
        },
      }
    : begun.definition;
  return <NewStudy {...begun} key={search.toString()} definition={definition} limitSets={limitSets.data} />;
}

interface Begun {
  definition: StudyDefinition;
  series: FourierSeries;
}

function NewStudy(props: Begun & { limitSets: Parameters<typeof useStudySlots>[2] }) {
  const project = useProject(useProjectId());
  const navigate = useNavigate();
  const { slots } = useStudySlots(project.id, props.definition.input, props.limitSets);
  return (
    <StudyPage
      {...props}
      study={null}
      projectId={project.id}
      projectName={project.name}
      mayWrite={holds('study.write', project.role)}
      slots={slots}
      onSaved={({ id }) => void navigate(paths.study(project.id, id))}
    />
  );
}

function ofChannel(analysis: Analysis, index: number): Begun | null {
  const channel = analysis.channels.find((each) => each.index === index);
  const series = channel ? seriesOfChannel(channel) : null;
  if (!channel || !series) return null;
  const input = { kind: 'channel' as const, analysisId: analysis.id, channel: index };
  return { definition: emptyDefinition(input, channel), series };
}

function ofWave(): Begun {
  return {
    definition: emptyDefinition(firstWave, { quantity: 'current', unit: 'A' }),
    series: textbookSeries(firstWave),
  };
}
