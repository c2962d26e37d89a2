import { Button } from '@chakra-ui/react';
import type { ChannelAnalysis, LimitSet, Verdict } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { useState, type ReactNode } from 'react';
import { EmptyState } from '../../../components/empty-state.js';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { Modal } from '../../../components/modal.js';
import { limitSetsQuery } from '../api/list-limit-sets.js';
import { useCreateVerdict } from '../hooks/use-create-verdict.js';
import { askedParameters, readParameters, setsForChannel, type JudgeDraft } from '../judge-draft.js';
import type { RepeatCandidate } from '../repeat-candidates.js';
import { JudgeForm } from './judge-form.js';
import { VerdictView } from './verdict-view.js';

interface JudgeDialogProps {
  open: boolean;
  onClose: () => void;
  projectId: string;
  /** A finished analysis. */
  analysisId: string;
  /** Channels of the analysis. */
  channels: readonly ChannelAnalysis[];
  /** Recording as people call it: R-0147. */
  subject: string;
  /** Channel to begin with; the first one when absent. */
  channel?: number;
  /** Set to begin with, where it fits the channel. */
  limitSetId?: string | null;
  /** Other recordings of the project, to choose repeats of the test from. */
  repeatCandidates?: readonly RepeatCandidate[];
  /** What can be done with the verdict once it is stored. */
  verdictActions?: (verdict: Verdict) => ReactNode;
}

/** Applies a limit set to a channel by a decision rule: choose, see what it leads to, store the verdict. */
export function JudgeDialog({ open, onClose, ...rest }: JudgeDialogProps) {
  return open ? <OpenDialog onClose={onClose} {...rest} /> : null;
}

function OpenDialog(props: Omit<JudgeDialogProps, 'open'>) {
  const { projectId, channels, subject, onClose } = props;
  const limitSets = useQuery(limitSetsQuery(projectId));
  if (limitSets.isSuccess && channels.length > 0) return <Judging {...props} limitSets={limitSets.data} />;
  return (
    <Modal open onClose={onClose} title={`Judge ${subject}`} size="xl">
      {limitSets.isError ? (
        <ErrorState error={limitSets.error} onRetry={() => void limitSets.refetch()} />
      ) : channels.length === 0 ? (
        <EmptyState title="No channel was analysed">Analyse the recording, then judge it.</EmptyState>
      ) : (
        <LoadingState label="Loading the limit sets" />
      )}
    </Modal>
  );
}

function Judging({
  limitSets,
  ...props
}: Omit<JudgeDialogProps, 'open'> & { limitSets: readonly LimitSet[] }) {
  const { onClose, projectId, analysisId, channels, subject, repeatCandidates, verdictActions } = props;
  const [draft, setDraft] = useState(() => firstDraft(props, limitSets));
  const create = useCreateVerdict(projectId, analysisId);
  const set = limitSets.find(({ id }) => id === draft.limitSetId);
  const channel = channels.find(({ index }) => index === draft.channel);
  const asked = set ? askedParameters(set, draft.decisionRule, channel) : { needed: [], optional: [] };
  const read = readParameters(asked, draft.entries);
  const complete = set !== undefined && read.missing.length === 0 && Object.keys(read.problems).length === 0;
  const verdict = create.data;
  const judge = () =>
    create.mutate({
      limitSetId: draft.limitSetId,
      channel: draft.channel,
      decisionRule: draft.decisionRule,
      parameters: read.parameters,
      ...(draft.repeats.length > 0 ? { repeats: draft.repeats } : {}),
    });
  return (
    <Modal
      open
      onClose={onClose}
      title={verdict ? `Verdict on ${subject}` : `Judge ${subject}`}
      size="xl"
      footer={
        verdict ? (
          <>
            <Button onClick={() => create.reset()}>Judge again</Button>
            <Button onClick={onClose}>Close</Button>
            {verdictActions?.(verdict)}
          </>
        ) : (
          <>
            <Button onClick={onClose}>Cancel</Button>
            <Button variant="solid" disabled={!complete} loading={create.isPending} onClick={judge}>
              Store the verdict
            </Button>
          </>
        )
      }
    >
      {create.isError ? <ErrorState error={create.error} title="The verdict was not stored" /> : null}
      {verdict ? (
        <VerdictView verdict={verdict} subject={subject} />
      ) : (
        <JudgeForm
          channels={channels}
          limitSets={limitSets}
          repeatCandidates={repeatCandidates ?? []}
          draft={draft}
          onChange={setDraft}
        />
      )}
    </Modal>
  );
}

function firstDraft(
  { channels, channel, limitSetId }: Pick<JudgeDialogProps, 'channels' | 'channel' | 'limitSetId'>,
  limitSets: readonly LimitSet[],
): JudgeDraft {
  const chosen = channels.find(({ index }) => index === channel) ?? channels[0];
  const { fitting } = setsForChannel(limitSets, chosen);
  const set = fitting.find(({ id }) => id === limitSetId) ?? fitting[0];
  return {
    channel: chosen?.index ?? 0,
    limitSetId: set?.id ?? '',
    decisionRule: 'simple-acceptance',
    entries: {},
    repeats: [],
  };
}
