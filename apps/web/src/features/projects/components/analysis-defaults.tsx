import { Input, Stack } from '@chakra-ui/react';
import type { LimitSet } from '@overtally/contracts';
import type { UseFormReturn } from 'react-hook-form';
import { FormField, SelectInput } from '../../../components/form-field.js';
import { Section } from '../../../components/section.js';
import { limitSetChoice } from '../../../lib/limit-set-name.js';
import type { ProjectForm } from '../settings-form-values.js';

const profiles = [
  { value: 'mains', label: 'Mains: synchronous 200 ms windows' },
  { value: 'tone', label: 'Tone: single-tone quality' },
  { value: 'general', label: 'General: averaged windowed spectrum' },
];

const nominals = [
  { value: 'auto', label: 'Found in each recording' },
  { value: '50', label: '50 Hz' },
  { value: '60', label: '60 Hz' },
  { value: 'other', label: 'Another frequency' },
];

interface AnalysisDefaultsProps {
  form: UseFormReturn<ProjectForm>;
  limitSets: readonly LimitSet[];
}

/** Settings of the analysis that follows each upload, and the limits that lists compare with. */
export function AnalysisDefaults({ form, limitSets }: AnalysisDefaultsProps) {
  const { errors } = form.formState;
  const limitOptions = [
    { value: '', label: 'None' },
    ...limitSets.map((set) => ({
      value: set.id,
      label: [limitSetChoice(set), set.edition].filter(Boolean).join(', '),
    })),
  ];
  return (
    <Section title="New recordings" lead="Analyses that exist keep the settings they were made with.">
      <Stack gap="4" maxW="lg">
        <FormField label="Profile" error={errors.profile?.message}>
          <SelectInput options={profiles} {...form.register('profile')} />
        </FormField>
        <FormField
          label="Nominal frequency"
          error={errors.nominal?.message}
          help="Where the fundamental is looked for."
        >
          <SelectInput options={nominals} {...form.register('nominal')} />
        </FormField>
        {form.watch('nominal') === 'other' ? (
          <FormField label="Frequency in Hz" error={errors.nominalOtherHz?.message}>
            <Input inputMode="decimal" maxW="40" fontFamily="mono" {...form.register('nominalOtherHz')} />
          </FormField>
        ) : null}
        <FormField
          label="Lists compare with"
          error={errors.comparisonLimitSetId?.message}
          help="For the tally strips beside recordings. A verdict names its own limit set."
        >
          <SelectInput options={limitOptions} {...form.register('comparisonLimitSetId')} />
        </FormField>
      </Stack>
    </Section>
  );
}
