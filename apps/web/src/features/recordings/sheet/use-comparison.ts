import type { ChannelAnalysis, LimitSet, Project } from '@overtally/contracts';
import { useMemo, useState } from 'react';
import { compareChannel } from '../charts/order-rows.js';

/** The limit set a channel is put beside: the chosen one, else that of the project when it is of the same quantity. */
export function useComparison(channel: ChannelAnalysis, project: Project, limitSets: readonly LimitSet[]) {
  const [chosenId, setChosenId] = useState<string | null>(null);
  const sets = useMemo(
    () => limitSets.filter((set) => set.quantity === channel.quantity),
    [limitSets, channel.quantity],
  );
  const wantedId = chosenId ?? project.comparisonLimitSetId;
  const set = sets.find(({ id }) => id === wantedId) ?? null;
  const comparison = useMemo(() => compareChannel(channel, set), [channel, set]);
  return { sets, set, comparison, choose: setChosenId };
}
