import type { SendReport } from '@overtally/contracts';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { retryMail } from '../../../lib/retry-mail.js';
import { deliveriesQuery } from '../api/list-deliveries.js';
import { sendReport } from '../api/send-report.js';

/** Sending a report to somebody else, and once more; the list follows. */
export function useDeliveryChanges(reportId: string) {
  const queryClient = useQueryClient();
  const onSettled = () => queryClient.invalidateQueries({ queryKey: deliveriesQuery(reportId).queryKey });
  return {
    send: useMutation({ mutationFn: (recipient: SendReport) => sendReport(reportId, recipient), onSettled }),
    retry: useMutation({ mutationFn: retryMail, onSettled }),
  };
}
