import { Button, Grid, Input, Stack } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import { windowNameSchema, type Recording, type Settings } from '@overtally/contracts';
import { useForm } from 'react-hook-form';
import { FormField, SelectInput } from '../../../../components/form-field.js';
import { FormProblem } from '../../../../components/form-problem.js';
import { Modal } from '../../../../components/modal.js';
import { notifyDone } from '../../../../components/notify.js';
import { setFormProblem } from '../../../../lib/form-errors.js';
import type { Span } from '../../charts/span.js';
import { useRecordingChanges } from '../../hooks/use-recording-changes.js';
import { settingsFormSchema, toSettings, toSettingsForm, type SettingsForm } from './settings-values.js';
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

const profiles = [
  { value: 'mains', label: 'Mains: synchronous 200 ms windows' },
  { value: 'tone', label: 'Tone: single-tone quality' },
  { value: 'general', label: 'General: averaged windowed spectrum' },
];
const nominals = [
  { value: 'auto', label: 'Found in the record' },
  { value: '50', label: '50 Hz' },
  { value: '60', label: '60 Hz' },
  { value: 'other', label: 'Another frequency' },
];
const windows = [
  { value: '', label: 'As the profile has it' },
  ...windowNameSchema.options.map((value) => ({ value, label: value })),
];

function AnalyseForm({ recording, settings, view, onClose }: Omit<AnalyseDialogProps, 'open'>) {
  const form = useForm<SettingsForm>({
    resolver: zodResolver(settingsFormSchema),
    defaultValues: toSettingsForm(settings, view),
  });
  const { errors } = form.formState;
  const { analyse } = useRecordingChanges(recording);
  const start = form.handleSubmit((values) =>
    analyse.mutate(toSettings(values, settings), {
      onSuccess: () => {
        notifyDone('Analysis started');
        onClose();
      },
      onError: (error) => setFormProblem(form, error),
    }),
  );
  const mono = { fontFamily: 'mono', inputMode: 'decimal' } as const;
  return (
    <form noValidate onSubmit={start}>
      <Stack gap="4">
        <FormProblem message={errors.root?.message} />
        <FormField label="Profile" error={errors.profile?.message}>
          <SelectInput options={profiles} {...form.register('profile')} />
        </FormField>
        <Grid gap="4" templateColumns={{ base: '1fr', sm: '1fr 1fr' }}>
          <FormField label="Nominal frequency" error={errors.nominal?.message}>
            <SelectInput options={nominals} {...form.register('nominal')} />
          </FormField>
          {form.watch('nominal') === 'other' ? (
            <FormField label="Frequency in Hz" error={errors.nominalOtherHz?.message}>
              <Input {...mono} {...form.register('nominalOtherHz')} />
            </FormField>
          ) : null}
        </Grid>
        <Grid gap="4" templateColumns={{ base: '1fr', sm: '1fr 1fr' }}>
          <FormField label="Highest order" optional error={errors.maxOrder?.message} help="50 when empty.">
            <Input {...mono} {...form.register('maxOrder')} />
          </FormField>
          <FormField
            label="Highest order in THD"
            optional
            error={errors.thdMaxOrder?.message}
            help="40 when empty; 10 for a tone."
          >
            <Input {...mono} {...form.register('thdMaxOrder')} />
          </FormField>
        </Grid>
        <FormField
          label="Window of the drawn spectrum"
          error={errors.window?.message}
          help="The windows of the mains profile stay rectangular."
        >
          <SelectInput options={windows} {...form.register('window')} />
        </FormField>
        <SpanFields form={form} durationS={recording.durationS} />
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
