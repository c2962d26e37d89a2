import { Box } from '@chakra-ui/react';
import { mailStatusSchema, type MailStatus } from '@overtally/contracts';
import { useInfiniteQuery } from '@tanstack/react-query';
import { useSearchParams } from 'react-router-dom';
import { EmptyState } from '../../components/empty-state.js';
import { ErrorState } from '../../components/error-state.js';
import { LoadingState } from '../../components/loading-state.js';
import { PageHeader } from '../../components/page-header.js';
import { Segmented } from '../../components/segmented.js';
import { useAccount } from '../../features/account/hooks/use-account.js';
import { mailsQuery } from '../../features/mails/api/list-mails.js';
import { MailList } from '../../features/mails/components/mail-list.js';
import { paths } from '../paths.js';

const choices = [
  { value: 'all', label: 'All' },
  { value: 'queued', label: 'Waiting' },
  { value: 'sent', label: 'Sent' },
  { value: 'failed', label: 'Failed' },
] as const satisfies readonly { value: MailStatus | 'all'; label: string }[];

const deliveryWords = {
  local: 'No mail server is set (SMTP_URL): messages stay here, whole, with their links.',
  smtp: 'Messages go out by the mail server. Links in them are for their readers alone.',
} as const;

export function Component() {
  const account = useAccount();
  if (account.isAdministrator) return <Mailbox />;
  return (
    <>
      <PageHeader title="Mailbox" />
      <EmptyState title="Only administrators read the mailbox">
        Ask an administrator of this installation.
      </EmptyState>
    </>
  );
}

function Mailbox() {
  const [search, setSearch] = useSearchParams();
  const status = mailStatusSchema.safeParse(search.get('status')).data ?? null;
  const query = useInfiniteQuery(mailsQuery(status));
  const pages = query.data?.pages;
  const mails = pages?.flatMap(({ items }) => items) ?? [];
  return (
    <>
      <PageHeader title="Mailbox" subtitle={pages?.[0] ? deliveryWords[pages[0].delivery] : undefined} />
      <Box mb="3">
        <Segmented
          label="Which messages"
          value={status ?? 'all'}
          options={choices}
          onChange={(value) => setSearch(value === 'all' ? {} : { status: value }, { replace: true })}
        />
      </Box>
      {query.isPending ? <LoadingState label="Loading the messages" /> : null}
      {query.isError ? <ErrorState error={query.error} onRetry={() => void query.refetch()} /> : null}
      {query.isSuccess && mails.length === 0 ? (
        <EmptyState title="No messages">
          Invitations, requests for review, issued reports and calibrations that are due are listed here.
        </EmptyState>
      ) : null}
      {mails.length > 0 ? (
        <MailList
          mails={mails}
          addressOf={paths.mail}
          hasMore={query.hasNextPage}
          isLoadingMore={query.isFetchingNextPage}
          onMore={() => void query.fetchNextPage()}
        />
      ) : null}
    </>
  );
}
