import { Box, Button, Flex, Text } from '@chakra-ui/react';
import { holds, type Mail, type ProjectRole, type Report } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { MailStanding } from '../../../components/mail-standing.js';
import { notifyDone, notifyProblem } from '../../../components/notify.js';
import { Section } from '../../../components/section.js';
import { deliveriesQuery } from '../api/list-deliveries.js';
import { useDeliveryChanges } from '../hooks/use-delivery-changes.js';
import { SendReportDialog } from './send-report-dialog.js';

interface ReportDeliveriesProps {
  report: Pick<Report, 'id' | 'status'>;
  role: ProjectRole | null;
  isAdministrator: boolean;
}

/** To whom an issued report was sent, and how it fared; nothing for those who may not see it. */
export function ReportDeliveries({ report, role, isAdministrator }: ReportDeliveriesProps) {
  if (report.status !== 'issued' && report.status !== 'superseded') return null;
  if (!holds('delivery.read', role, isAdministrator)) return null;
  return <Deliveries report={report} role={role} isAdministrator={isAdministrator} />;
}

function Deliveries({ report, role, isAdministrator }: ReportDeliveriesProps) {
  const deliveries = useQuery(deliveriesQuery(report.id));
  const [sending, setSending] = useState(false);
  const maySend = report.status === 'issued' && holds('delivery.send', role);
  return (
    <Section
      title="Sent to"
      mt="8"
      actions={maySend ? <Button onClick={() => setSending(true)}>Send to somebody else</Button> : undefined}
    >
      {deliveries.isPending ? <LoadingState label="Loading the recipients" /> : null}
      {deliveries.isError ? (
        <ErrorState error={deliveries.error} onRetry={() => void deliveries.refetch()} />
      ) : null}
      {deliveries.data?.length === 0 ? (
        <Text color="inkSoft">The report was sent to nobody by e-mail.</Text>
      ) : null}
      <Box as="ul" listStyleType="none">
        {deliveries.data?.map((mail) => (
          <Delivery
            key={mail.id}
            reportId={report.id}
            mail={mail}
            mayRetry={holds('mail.retry', role, isAdministrator)}
          />
        ))}
      </Box>
      <SendReportDialog reportId={report.id} open={sending} onClose={() => setSending(false)} />
    </Section>
  );
}

function Delivery({ reportId, mail, mayRetry }: { reportId: string; mail: Mail; mayRetry: boolean }) {
  const { retry } = useDeliveryChanges(reportId);
  const { name, email } = mail.to;
  const again = () =>
    retry.mutate(mail.id, {
      onSuccess: () => notifyDone(`The message to ${email} is sent again`),
      onError: (error) => notifyProblem('Not sent again', error),
    });
  return (
    <Flex as="li" gap="4" wrap="wrap" py="2" borderBottomWidth="1px" borderColor="rule">
      <Box flex="1 1 220px" minW="0">
        <Text overflowWrap="anywhere">{name ? `${name}, ${email}` : email}</Text>
        <Text fontSize="13px" color="inkSoft">
          {mail.attachments.length > 0 ? 'with the PDF' : 'told, without the PDF'}
        </Text>
      </Box>
      <Box flex="1 1 220px" minW="0">
        <MailStanding mail={mail} />
      </Box>
      {mayRetry && mail.status !== 'sent' && mail.attempts > 0 ? (
        <Button size="xs" aria-label={`Send now to ${email}`} loading={retry.isPending} onClick={again}>
          Send now
        </Button>
      ) : null}
    </Flex>
  );
}
