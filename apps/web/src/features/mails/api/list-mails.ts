import { mailboxPageSchema, type MailStatus } from '@overtally/contracts';
import { infiniteQueryOptions } from '@tanstack/react-query';
import { requestJson } from '../../../lib/http.js';

/** Messages of the installation page by page, the newest first, for administrators. */
export const mailsQuery = (status: MailStatus | null) =>
  infiniteQueryOptions({
    queryKey: ['mails', { status }],
    queryFn: ({ pageParam, signal }) =>
      requestJson(mailboxPageSchema, '/mails', { query: { status, cursor: pageParam }, signal }),
    initialPageParam: null as string | null,
    getNextPageParam: ({ nextCursor }) => nextCursor,
    refetchInterval: 10_000,
  });
