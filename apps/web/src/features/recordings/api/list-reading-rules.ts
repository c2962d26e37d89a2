import { readingRuleListSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { requestJson } from '../../../lib/http.js';

/** Reading rules of a project, the one that is tried first on top. */
export const readingRulesQuery = (projectId: string) =>
  queryOptions({
    queryKey: ['projects', projectId, 'reading-rules'],
    queryFn: async ({ signal }) => {
      const { items } = await requestJson(readingRuleListSchema, `/projects/${projectId}/reading-rules`, {
        signal,
      });
      return items;
    },
  });
