import { Grid, GridItem, Input, Textarea } from '@chakra-ui/react';
import { equipmentLine, type Recording } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { FormField, SelectInput } from '../../../components/form-field.js';
import { chainsQuery, equipmentQuery } from '../../../lib/bench-queries.js';
import type { BenchValues } from './bench-values.js';

interface BenchFieldsProps {
  projectId: string;
  values: BenchValues;
  errors: Partial<Record<keyof BenchValues, string | undefined>>;
  /** What it names already stays to be chosen, retired or not. */
  recording?: Recording;
  onChange: (values: BenchValues) => void;
}

const conditions = [
  { key: 'ambientTemperatureC', label: 'Ambient temperature, °C', numeric: true },
  { key: 'relativeHumidityPercent', label: 'Relative humidity, %', numeric: true },
  { key: 'supplyVoltageV', label: 'Nominal test voltage, V', numeric: true },
  { key: 'supplyFrequencyHz', label: 'Nominal supply frequency, Hz', numeric: true },
  { key: 'supply', label: 'Supply', numeric: false },
  { key: 'place', label: 'Place', numeric: false },
] as const;

const retiredMark = (isRetired: boolean) => (isRetired ? ' (retired)' : '');

/** Equipment, operating mode, measuring chain and conditions of captures. */
export function BenchFields({ projectId, values, errors, recording, onChange }: BenchFieldsProps) {
  const equipment = useQuery(equipmentQuery(projectId)).data ?? [];
  const chains = useQuery(chainsQuery()).data ?? [];
  const set = (change: Partial<BenchValues>) => onChange({ ...values, ...change });
  const piece = equipment.find(({ id }) => id === values.equipmentId);
  const pieces = equipment.filter(({ id, retiredAt }) => !retiredAt || id === recording?.equipment?.id);
  const modes = (piece?.operatingModes ?? []).filter(
    ({ id, retired }) => !retired || id === recording?.operatingMode?.id,
  );
  const offered = chains.filter(({ id, retiredAt }) => !retiredAt || id === recording?.chain?.id);
  return (
    <Grid gap="4" templateColumns={{ base: '1fr', md: '1fr 1fr' }}>
      <FormField label="Equipment of the project" optional error={errors.equipmentId}>
        <SelectInput
          value={values.equipmentId}
          options={[
            { value: '', label: pieces.length > 0 ? 'Not chosen' : 'None entered on the equipment page' },
            ...pieces.map((each) => ({
              value: each.id,
              label: equipmentLine(each) + retiredMark(each.retiredAt !== null),
            })),
          ]}
          onChange={(event) => set({ equipmentId: event.target.value, operatingModeId: '' })}
        />
      </FormField>
      <FormField label="Operating mode" optional error={errors.operatingModeId}>
        <SelectInput
          value={values.operatingModeId}
          disabled={!piece}
          options={[
            { value: '', label: 'Not chosen' },
            ...modes.map(({ id, name, retired }) => ({ value: id, label: name + retiredMark(retired) })),
          ]}
          onChange={(event) => set({ operatingModeId: event.target.value })}
        />
      </FormField>
      <FormField label="Chain of the laboratory" optional error={errors.measuringChainId}>
        <SelectInput
          value={values.measuringChainId}
          options={[
            { value: '', label: offered.length > 0 ? 'Not chosen' : 'No measuring chain is in use' },
            ...offered.map(({ id, name, retiredAt }) => ({
              value: id,
              label: name + retiredMark(retiredAt !== null),
            })),
          ]}
          onChange={(event) => set({ measuringChainId: event.target.value })}
        />
      </FormField>
      {conditions.map(({ key, label, numeric }) => (
        <FormField key={key} label={label} optional error={errors[key]}>
          <Input
            autoComplete="off"
            {...(numeric ? { inputMode: 'decimal', fontFamily: 'mono' } : {})}
            value={values[key]}
            onChange={(event) => set({ [key]: event.target.value })}
          />
        </FormField>
      ))}
      <GridItem colSpan={{ base: 1, md: 2 }}>
        <FormField label="Remark on the conditions" optional error={errors.remark}>
          <Textarea
            rows={2}
            value={values.remark}
            onChange={(event) => set({ remark: event.target.value })}
          />
        </FormField>
      </GridItem>
    </Grid>
  );
}
