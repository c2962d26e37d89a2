import { Button, Stack } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import type { Recording, Settings } from '@overtally/contracts';
import { useForm } from 'react-hook-form';
import { FormProblem } from '../../../../components/form-problem.js';
import { Modal } from '../../../../components/modal.js';
import { notifyDone } from '../../../../components/notify.js';
import { setFormProblem } from '../../../../lib/form-errors.js';
import type { Span } from '../../charts/span.js';
import { useRecordingChanges } from '../../hooks/use-recording-changes.js';
import { ChainFields } from './chain-fields.js';
import { FormPart } from './form-part.js';
import { chainSummary, pairingSummary, spectrumSummary } from './part-summaries.js';
import { PairingFields } from './pairing-fields.js';
import { ProfileFields, SpectrumFields } from './profile-fields.js';
import { settingsFormSchema, type SettingsForm } from './settings-form.js';
import { toSettings, toSettingsForm } from './settings-values.js';
import { SpanFields } from './span-fields.js';

interface AnalyseDialogProps {
  recording: Recording;
  /** Settings to begin with: those of the analysis in view. */
  settings: Settings;
  view: Span;
  open: boolean;
  onClose: () => void;
}

/** Starts another analysis of the same samples; earlier ones stand beside it. */
export function AnalyseDialog({ open, onClose, ...props }: AnalyseDialogProps) {
  return (
    <Modal open={open} onClose={onClose} title={`Analyse ${props.recording.number} again`} size="lg">
      <AnalyseForm onClose={onClose} {...props} />
    </Modal>
  );
}

function AnalyseForm({ recording, settings, view, onClose }: Omit<AnalyseDialogProps, 'open'>) {
  const { channels, durationS } = recording;
  const form = useForm<SettingsForm>({
    resolver: zodResolver(settingsFormSchema),
    defaultValues: toSettingsForm(settings, view, channels),
  });
  const { errors } = form.formState;
  const { analyse } = useRecordingChanges(recording);
  const start = form.handleSubmit((values) =>
    analyse.mutate(toSettings(values), {
      onSuccess: () => {
        notifyDone('Analysis started');
        onClose();
      },
      onError: (error) => setFormProblem(form, error),
    }),
  );
  const values = form.watch();
  const has = (quantity: string) => channels.some((channel) => channel.quantity === quantity);
  const mayHavePower = values.profile !== 'tone' && has('voltage') && has('current');
  return (
    <form noValidate onSubmit={start}>
      <Stack gap="4">
        <FormProblem message={errors.root?.message} />
        <ProfileFields form={form} />
        <SpanFields form={form} durationS={durationS} />
        <Stack gap="2">
          <FormPart
            title="Spectrum"
            summary={spectrumSummary(values)}
            isWrong={Boolean(errors.kaiserBeta || errors.segmentLength || errors.overlapPercent)}
          >
            <Stack gap="4">
              <SpectrumFields form={form} />
            </Stack>
          </FormPart>
          {mayHavePower ? (
            <FormPart
              title="Power"
              summary={pairingSummary(values, channels)}
              isWrong={Boolean(errors.pairs || errors.sets || errors.ratedCurrentA)}
            >
              <PairingFields form={form} channels={channels} />
            </FormPart>
          ) : null}
          <FormPart title="Measuring chain" summary={chainSummary(values)} isWrong={Boolean(errors.accuracy)}>
            <ChainFields form={form} />
          </FormPart>
        </Stack>
        <Stack direction="row" justify="flex-end" gap="2">
          <Button onClick={onClose}>Cancel</Button>
          <Button type="submit" variant="solid" loading={analyse.isPending}>
            Start analysis
          </Button>
        </Stack>
      </Stack>
    </form>
  );
}
