import { calibrationPageSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { listAll } from '../../../lib/list-all.js';

/** Calibrations of an instrument, the newest first. */
export const calibrationsQuery = (instrumentId: string) =>
  queryOptions({
    queryKey: ['laboratory', 'instruments', instrumentId, 'calibrations'],
    queryFn: ({ signal }) =>
      listAll(calibrationPageSchema, `/instruments/${instrumentId}/calibrations`, { signal }),
  });
