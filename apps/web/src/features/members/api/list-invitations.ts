import { invitationPageSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { listAll } from '../../../lib/list-all.js';

/** Invitations to a project, the newest first, for those who manage its members. */
export const invitationsQuery = (projectId: string) =>
  queryOptions({
    queryKey: ['projects', projectId, 'invitations'],
    queryFn: ({ signal }) => listAll(invitationPageSchema, `/projects/${projectId}/invitations`, { signal }),
  });
