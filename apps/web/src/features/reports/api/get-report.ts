import { reportSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { requestJson } from '../../../lib/http.js';

export const reportQuery = (reportId: string) =>
  queryOptions({
    queryKey: ['reports', reportId],
    queryFn: ({ signal }) => requestJson(reportSchema, `/reports/${reportId}`, { signal }),
  });
