import type { CreateVerdict } from '@overtally/contracts';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { createVerdict } from '../api/create-verdict.js';
import { analysisVerdictsQuery, projectVerdictsQuery } from '../api/list-verdicts.js';

/** Makes a verdict; it cannot be changed afterwards, another one is made instead. */
export function useCreateVerdict(projectId: string, analysisId: string) {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (input: CreateVerdict) => createVerdict(analysisId, input),
    onSuccess: () =>
      Promise.all([
        queryClient.invalidateQueries({ queryKey: analysisVerdictsQuery(analysisId).queryKey }),
        queryClient.invalidateQueries({ queryKey: projectVerdictsQuery(projectId).queryKey }),
      ]),
  });
}
