import { laboratorySchema, type Laboratory, type UpdateLaboratory } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { requestJson } from '../../../lib/http.js';

/** The laboratory that reports name. */
export const laboratoryQuery = () =>
  queryOptions({
    queryKey: ['laboratory', 'details'],
    queryFn: ({ signal }) => requestJson(laboratorySchema, '/laboratory', { signal }),
  });

export function putLaboratory(body: UpdateLaboratory): Promise<Laboratory> {
  return requestJson(laboratorySchema, '/laboratory', { method: 'PUT', body });
}
