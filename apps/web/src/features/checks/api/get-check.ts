import { reportCheckSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { requestJson } from '../../../lib/http.js';

/** What the laboratory tells anybody of the report that number and code are printed on. */
export const checkQuery = (number: string, code: string) =>
  queryOptions({
    queryKey: ['report-checks', number, code],
    queryFn: ({ signal }) =>
      requestJson(
        reportCheckSchema,
        `/report-checks/${encodeURIComponent(number)}/${encodeURIComponent(code)}`,
        { signal },
      ),
  });
