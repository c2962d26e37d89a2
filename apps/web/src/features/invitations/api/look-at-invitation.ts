import { offeredInvitationSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { requestJson } from '../../../lib/http.js';

/** What the secret of a link offers. */
export const offeredInvitationQuery = (token: string) =>
  queryOptions({
    queryKey: ['offered-invitation', token],
    queryFn: ({ signal }) =>
      requestJson(offeredInvitationSchema, '/invitations/look', { method: 'POST', body: { token }, signal }),
    retry: false,
    gcTime: 0,
  });
