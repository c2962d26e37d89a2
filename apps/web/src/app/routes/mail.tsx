import { Button } from '@chakra-ui/react';
import { useQuery } from '@tanstack/react-query';
import { Link, useParams } from 'react-router-dom';
import { ErrorState } from '../../components/error-state.js';
import { LoadingState } from '../../components/loading-state.js';
import { PageHeader } from '../../components/page-header.js';
import { mailQuery } from '../../features/mails/api/get-mail.js';
import { MailView } from '../../features/mails/components/mail-view.js';
import { paths } from '../paths.js';

export function Component() {
  const { mailId = '' } = useParams();
  const { data: mail, ...query } = useQuery(mailQuery(mailId));
  return (
    <>
      <PageHeader
        title={mail?.subject ?? 'Message'}
        actions={
          <Button asChild>
            <Link to={paths.mailbox()}>All messages</Link>
          </Button>
        }
      />
      {mail ? <MailView mail={mail} /> : null}
      {query.isPending ? <LoadingState label="Loading the message" lines={8} /> : null}
      {query.isError ? <ErrorState error={query.error} onRetry={() => void query.refetch()} /> : null}
    </>
  );
}
