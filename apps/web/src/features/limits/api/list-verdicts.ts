import { verdictPageSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { listAll } from '../../../lib/list-all.js';

/** Verdicts on one analysis, the newest first. */
export const analysisVerdictsQuery = (analysisId: string) =>
  queryOptions({
    queryKey: ['analyses', analysisId, 'verdicts'],
    queryFn: ({ signal }) => listAll(verdictPageSchema, `/analyses/${analysisId}/verdicts`, { signal }),
  });

/** All verdicts of a project, the newest first. */
export const projectVerdictsQuery = (projectId: string) =>
  queryOptions({
    queryKey: ['projects', projectId, 'verdicts'],
    queryFn: ({ signal }) => listAll(verdictPageSchema, `/projects/${projectId}/verdicts`, { signal }),
  });
