import { Button, Input, Stack, Text } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import { sendReportSchema } from '@overtally/contracts';
import { useForm } from 'react-hook-form';
import { FormField } from '../../../components/form-field.js';
import { FormProblem } from '../../../components/form-problem.js';
import { Modal } from '../../../components/modal.js';
import { notifyDone } from '../../../components/notify.js';
import { setFormProblem } from '../../../lib/form-errors.js';
import { useDeliveryChanges } from '../hooks/use-delivery-changes.js';

interface SendReportDialogProps {
  reportId: string;
  open: boolean;
  onClose: () => void;
}

/** Sends an issued report to one more recipient. */
export function SendReportDialog({ reportId, open, onClose }: SendReportDialogProps) {
  return (
    <Modal open={open} onClose={onClose} title="Send the report">
      <SendReportForm reportId={reportId} onClose={onClose} />
    </Modal>
  );
}

function SendReportForm({ reportId, onClose }: Omit<SendReportDialogProps, 'open'>) {
  const form = useForm({ resolver: zodResolver(sendReportSchema), defaultValues: { name: '', email: '' } });
  const { errors } = form.formState;
  const { send } = useDeliveryChanges(reportId);
  const submit = form.handleSubmit((recipient) =>
    send.mutate(recipient, {
      onSuccess: ({ to }) => {
        notifyDone(`The report goes to ${to.email}`);
        onClose();
      },
      onError: (error) => setFormProblem(form, error),
    }),
  );
  return (
    <form noValidate onSubmit={submit}>
      <Stack gap="4">
        <Text>The message carries the PDF as it was issued. It cannot be called back.</Text>
        <FormProblem message={errors.root?.message} />
        <FormField label="Name" optional error={errors.name?.message}>
          <Input autoComplete="off" {...form.register('name')} />
        </FormField>
        <FormField label="E-mail" error={errors.email?.message}>
          <Input type="email" autoComplete="off" {...form.register('email')} />
        </FormField>
        <Stack direction="row" justify="flex-end" gap="2">
          <Button onClick={onClose}>Cancel</Button>
          <Button type="submit" variant="solid" loading={send.isPending}>
            Send
          </Button>
        </Stack>
      </Stack>
    </form>
  );
}
