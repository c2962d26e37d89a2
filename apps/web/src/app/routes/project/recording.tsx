import { Button } from '@chakra-ui/react';
import { holds, type Analysis, type Project } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import {
  Link as RouterLink,
  useNavigate,
  useParams,
  useSearchParams,
  type LoaderFunctionArgs,
} from 'react-router-dom';
import { useAccount } from '../../../features/account/hooks/use-account.js';
import { limitSetsQuery } from '../../../features/limits/api/list-limit-sets.js';
import { JudgeDialog } from '../../../features/limits/components/judge-dialog.js';
import { VerdictList } from '../../../features/limits/components/verdict-list.js';
import { useProject } from '../../../features/projects/hooks/use-project.js';
import { recordingQuery } from '../../../features/recordings/api/get-recording.js';
import { RecordingSheet, type SheetPlace } from '../../../features/recordings/sheet/recording-sheet.js';
import { allRecordingsQuery } from '../../../features/recordings/api/list-all-recordings.js';
import { queryClient } from '../../../lib/query-client.js';
import { paths } from '../../paths.js';
import { useProjectId } from '../../use-project-id.js';

export async function loader({ params }: LoaderFunctionArgs): Promise<null> {
  await queryClient.ensureQueryData(recordingQuery(params.recordingId ?? ''));
  return null;
}

export function Component() {
  const navigate = useNavigate();
  const account = useAccount();
  const project = useProject(useProjectId());
  const { recordingId = '' } = useParams();
  const recording = useQuery(recordingQuery(recordingId));
  const limitSets = useQuery(limitSetsQuery(project.id));
  const place = useSheetPlace();
  if (!recording.data) return null;
  const mayJudge = holds('verdict.create', project.role, account.isAdministrator);
  const named = { project, subject: recording.data.number };
  return (
    <RecordingSheet
      key={recordingId}
      project={project}
      account={account}
      recording={recording.data}
      limitSets={limitSets.data ?? []}
      place={place}
      slots={{
        actions: (shown) => (
          <>
            {shown.analysis ? (
              <Button asChild>
                <RouterLink to={paths.overlay(project.id, [`${recordingId}:${shown.channel}`])}>
                  Add to overlay
                </RouterLink>
              </Button>
            ) : null}
            {shown.analysis ? (
              <Button asChild>
                <RouterLink
                  to={paths.newStudy(project.id, { analysisId: shown.analysis.id, channel: shown.channel })}
                >
                  Predict behind stages
                </RouterLink>
              </Button>
            ) : null}
            {shown.analysis?.supersededById === null && mayJudge ? (
              <JudgeButton {...shown} analysis={shown.analysis} {...named} />
            ) : null}
          </>
        ),
        verdicts: ({ id }) => (
          <VerdictList
            analysisId={id}
            subject={recording.data.number}
            verdictActions={({ id: verdictId }) => <PutIntoReport project={project} verdictId={verdictId} />}
          />
        ),
      }}
      onDeleted={() => void navigate(paths.recordings(project.id))}
    />
  );
}

interface JudgeButtonProps {
  project: Project;
  subject: string;
  analysis: Analysis;
  channel: number;
}

function JudgeButton({ project, subject, analysis, channel }: JudgeButtonProps) {
  const [open, setOpen] = useState(false);
  const recordings = useQuery({ ...allRecordingsQuery(project.id), enabled: open });
  return (
    <>
      <Button variant="solid" onClick={() => setOpen(true)}>
        Judge
      </Button>
      <JudgeDialog
        open={open}
        onClose={() => setOpen(false)}
        projectId={project.id}
        analysisId={analysis.id}
        channels={analysis.channels}
        channel={channel}
        limitSetId={project.comparisonLimitSetId}
        subject={subject}
        repeatCandidates={recordings.data?.filter(({ id }) => id !== analysis.recordingId) ?? []}
        verdictActions={({ id }) => <PutIntoReport project={project} verdictId={id} />}
      />
    </>
  );
}

/** The way from a verdict to a new report that begins with it. */
function PutIntoReport({ project, verdictId }: { project: Project; verdictId: string }) {
  if (!holds('report.write', project.role)) return null;
  return (
    <Button asChild variant="solid">
      <RouterLink to={paths.newReport(project.id, [verdictId])}>Put into a report</RouterLink>
    </Button>
  );
}

/** Analysis, channel and part stand in the address, so that a link shows what its sender saw. */
function useSheetPlace(): SheetPlace {
  const [search, setSearch] = useSearchParams();
  const set = (changes: Record<string, string | null>) =>
    setSearch(
      (current) => {
        const next = new URLSearchParams(current);
        for (const [name, value] of Object.entries(changes)) {
          if (value === null) next.delete(name);
          else next.set(name, value);
        }
        return next;
      },
      { preventScrollReset: true },
    );
  const channel = search.get('channel');
  return {
    analysisId: search.get('analysis'),
    channel: channel === null ? null : Number(channel),
    part: search.get('part') === 'power' ? 'power' : 'channel',
    onAnalysis: (id) => set({ analysis: id }),
    onChannel: (index) => set({ channel: String(index), part: null }),
    onPart: (part) => set({ part: part === 'power' ? part : null }),
  };
}
