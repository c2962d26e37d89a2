import { equipmentPageSchema, measuringChainPageSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { listAll } from './list-all.js';

/** Equipment under test of a project, retired pieces included. */
export const equipmentQuery = (projectId: string) =>
  queryOptions({
    queryKey: ['projects', projectId, 'equipment'],
    queryFn: ({ signal }) => listAll(equipmentPageSchema, `/projects/${projectId}/equipment`, { signal }),
  });

/** Measuring chains of the laboratory, retired ones included. */
export const chainsQuery = () =>
  queryOptions({
    queryKey: ['laboratory', 'chains'],
    queryFn: ({ signal }) => listAll(measuringChainPageSchema, '/measuring-chains', { signal }),
  });
