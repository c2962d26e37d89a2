import type { CreateReadingRule, UpdateReadingRule } from '@overtally/contracts';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { createReadingRule } from '../api/create-reading-rule.js';
import { deleteReadingRule } from '../api/delete-reading-rule.js';
import { readingRulesQuery } from '../api/list-reading-rules.js';
import { updateReadingRule } from '../api/update-reading-rule.js';

/** Keeping, changing and deleting the reading rules of a project. */
export function useRuleChanges(projectId: string) {
  const queryClient = useQueryClient();
  const onSettled = () => queryClient.invalidateQueries({ queryKey: readingRulesQuery(projectId).queryKey });
  return {
    create: useMutation({
      mutationFn: (rule: CreateReadingRule) => createReadingRule(projectId, rule),
      onSettled,
    }),
    update: useMutation({
      mutationFn: ({ id, change }: { id: string; change: UpdateReadingRule }) =>
        updateReadingRule(id, change),
      onSettled,
    }),
    remove: useMutation({ mutationFn: deleteReadingRule, onSettled }),
  };
}
