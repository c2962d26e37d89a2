import { mailMessageSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { requestJson } from '../../../lib/http.js';

/** A message whole, for administrators. */
export const mailQuery = (mailId: string) =>
  queryOptions({
    queryKey: ['mails', mailId],
    queryFn: ({ signal }) => requestJson(mailMessageSchema, `/mails/${mailId}`, { signal }),
  });
