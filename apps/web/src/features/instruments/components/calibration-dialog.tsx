import { Button, Grid, Input, Stack, Textarea } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import { createCalibrationSchema, maxCertificateBytes } from '@overtally/contracts';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { FormField } from '../../../components/form-field.js';
import { FormProblem } from '../../../components/form-problem.js';
import { Modal } from '../../../components/modal.js';
import { notifyDone } from '../../../components/notify.js';
import { setFormProblem } from '../../../lib/form-errors.js';
import { useLaboratoryChanges } from '../hooks/use-laboratory-changes.js';

interface CalibrationDialogProps {
  instrumentId: string;
  open: boolean;
  onClose: () => void;
}

/** Enters a calibration with its certificate. */
export function CalibrationDialog({ instrumentId, open, onClose }: CalibrationDialogProps) {
  return (
    <Modal open={open} onClose={onClose} title="New calibration" size="lg">
      <CalibrationForm instrumentId={instrumentId} onClose={onClose} />
    </Modal>
  );
}

const empty = {
  ...{ calibratedOn: '', dueOn: '', certificateNumber: '', calibratedBy: '' },
  ...{ uncertainty: '', remark: '' },
};

/** What is wrong with a certificate before it is sent; undefined where nothing shows. */
function faultOf(file: File | null): string | undefined {
  if (file === null || file.size <= maxCertificateBytes) return undefined;
  return 'The certificate is larger than 20 MiB; save it smaller';
}

function CalibrationForm({ instrumentId, onClose }: Omit<CalibrationDialogProps, 'open'>) {
  const form = useForm({ resolver: zodResolver(createCalibrationSchema), defaultValues: empty });
  const { errors } = form.formState;
  const [certificate, setCertificate] = useState<File | null>(null);
  const { addCalibration } = useLaboratoryChanges();
  const fault = faultOf(certificate);
  const submit = form.handleSubmit((calibration) => {
    if (fault) return;
    addCalibration.mutate(
      { instrumentId, calibration, certificate },
      {
        onSuccess: () => {
          notifyDone('Calibration entered');
          onClose();
        },
        onError: (error) => setFormProblem(form, error),
      },
    );
  });
  return (
    <form noValidate onSubmit={submit}>
      <Stack gap="4">
        <FormProblem message={errors.root?.message} />
        <Grid gap="4" templateColumns={{ base: '1fr', md: '1fr 1fr' }}>
          <FormField
            label="Calibrated on"
            error={
              errors.calibratedOn &&
              (errors.calibratedOn.type === 'server' ? errors.calibratedOn.message : 'Give the day')
            }
          >
            <Input type="date" {...form.register('calibratedOn')} />
          </FormField>
          <FormField
            label="Due on"
            help="Valid up to and including this day."
            error={errors.dueOn && (errors.dueOn.type === 'custom' ? errors.dueOn.message : 'Give the day')}
          >
            <Input type="date" {...form.register('dueOn')} />
          </FormField>
          <FormField label="Certificate number" optional error={errors.certificateNumber?.message}>
            <Input autoComplete="off" {...form.register('certificateNumber')} />
          </FormField>
          <FormField label="Calibrated by" optional error={errors.calibratedBy?.message}>
            <Input autoComplete="off" {...form.register('calibratedBy')} />
          </FormField>
        </Grid>
        <FormField
          label="Uncertainty"
          optional
          help="As the certificate states it, with its coverage factor."
          error={errors.uncertainty?.message}
        >
          <Input autoComplete="off" placeholder="0.12 % (k = 2)" {...form.register('uncertainty')} />
        </FormField>
        <FormField label="Certificate" optional help="PDF, PNG or JPEG, at most 20 MiB." error={fault}>
          <Input
            type="file"
            accept="application/pdf,image/png,image/jpeg"
            py="1"
            onChange={(event) => setCertificate(event.target.files?.[0] ?? null)}
          />
        </FormField>
        <FormField label="Remark" optional error={errors.remark?.message}>
          <Textarea rows={2} {...form.register('remark')} />
        </FormField>
        <Stack direction="row" justify="flex-end" gap="2">
          <Button onClick={onClose}>Cancel</Button>
          <Button type="submit" variant="solid" loading={addCalibration.isPending}>
            Enter calibration
          </Button>
        </Stack>
      </Stack>
    </form>
  );
}
