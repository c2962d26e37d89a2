import { Grid, Input } from '@chakra-ui/react';
import { windowNameSchema } from '@overtally/contracts';
import { DEFAULT_MAX_ORDER, DEFAULT_THD_ORDER } from '@overtally/dsp';
import type { UseFormReturn } from 'react-hook-form';
import { FormField, SelectInput } from '../../../../components/form-field.js';
import type { SettingsForm } from './settings-form.js';

export interface SettingsFieldsProps {
  form: UseFormReturn<SettingsForm>;
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
const mono = { fontFamily: 'mono', inputMode: 'decimal' } as const;
const two = { gap: '4', templateColumns: { base: '1fr', sm: '1fr 1fr' } } as const;

/** The profile, where the fundamental is looked for, and how high the orders go. */
export function ProfileFields({ form }: SettingsFieldsProps) {
  const { errors } = form.formState;
  const profile = form.watch('profile');
  return (
    <>
      <FormField label="Profile" error={errors.profile?.message}>
        <SelectInput options={profiles} {...form.register('profile')} />
      </FormField>
      <Grid {...two}>
        <FormField label="Nominal frequency" error={errors.nominal?.message}>
          <SelectInput options={nominals} {...form.register('nominal')} />
        </FormField>
        {form.watch('nominal') === 'other' ? (
          <FormField label="Frequency in Hz" error={errors.nominalOtherHz?.message}>
            <Input {...mono} {...form.register('nominalOtherHz')} />
          </FormField>
        ) : null}
        {profile === 'mains' ? (
          <FormField
            label="Cycles per window"
            optional
            error={errors.cyclesPerWindow?.message}
            help="10 at 50 Hz and 12 at 60 Hz when empty: about 200 ms."
          >
            <Input {...mono} {...form.register('cyclesPerWindow')} />
          </FormField>
        ) : null}
      </Grid>
      <Grid {...two}>
        <FormField
          label="Highest order"
          optional
          error={errors.maxOrder?.message}
          help={`${DEFAULT_MAX_ORDER} when empty.`}
        >
          <Input {...mono} {...form.register('maxOrder')} />
        </FormField>
        <FormField
          label="Highest order in THD"
          optional
          error={errors.thdMaxOrder?.message}
          help={`${DEFAULT_THD_ORDER[profile]} when empty.`}
        >
          <Input {...mono} {...form.register('thdMaxOrder')} />
        </FormField>
      </Grid>
      {profile === 'tone' ? (
        <Grid {...two}>
          <FormField
            label="THD+N in a band from, Hz"
            optional
            error={errors.bandFromHz?.message}
            help="Beside the THD+N of the whole spectrum."
          >
            <Input {...mono} {...form.register('bandFromHz')} />
          </FormField>
          <FormField label="to, Hz" optional error={errors.bandToHz?.message}>
            <Input {...mono} {...form.register('bandToHz')} />
          </FormField>
        </Grid>
      ) : null}
    </>
  );
}

/** The window of the spectrum, and how it is averaged. */
export function SpectrumFields({ form }: SettingsFieldsProps) {
  const { errors } = form.formState;
  const profile = form.watch('profile');
  return (
    <>
      <Grid {...two}>
        <FormField
          label="Window of the drawn spectrum"
          error={errors.window?.message}
          help={profile === 'mains' ? 'The synchronous windows stay rectangular.' : undefined}
        >
          <SelectInput options={windows} {...form.register('window')} />
        </FormField>
        {form.watch('window') === 'kaiser' ? (
          <FormField
            label="Shape β"
            optional
            error={errors.kaiserBeta?.message}
            help="9 when empty. Larger: lower sidelobes, wider lines."
          >
            <Input {...mono} {...form.register('kaiserBeta')} />
          </FormField>
        ) : null}
      </Grid>
      {profile === 'general' ? (
        <Grid {...two}>
          <FormField
            label="Segment length, samples"
            optional
            error={errors.segmentLength?.message}
            help="Follows from the record when empty."
          >
            <Input {...mono} {...form.register('segmentLength')} />
          </FormField>
          <FormField label="Overlap, %" optional error={errors.overlapPercent?.message} help="50 when empty.">
            <Input {...mono} {...form.register('overlapPercent')} />
          </FormField>
        </Grid>
      ) : null}
    </>
  );
}
