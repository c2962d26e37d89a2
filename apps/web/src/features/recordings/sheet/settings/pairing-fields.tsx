import { Box, Button, Flex, Grid, Input, Stack, Text } from '@chakra-ui/react';
import type { Channel } from '@overtally/contracts';
import { useFieldArray, type UseFormReturn } from 'react-hook-form';
import { FormField, SelectInput } from '../../../../components/form-field.js';
import { Segmented } from '../../../../components/segmented.js';
import { proposalWords } from './pairing-values.js';
import type { SettingsForm } from './settings-form.js';

interface PairingFieldsProps {
  form: UseFormReturn<SettingsForm>;
  channels: readonly Channel[];
}

const phases = [
  { value: '', label: 'None' },
  { value: '1', label: '1' },
  { value: '2', label: '2' },
  { value: '3', label: '3' },
];
const wires = [
  { value: '4w', label: 'Four wires: voltages to neutral' },
  { value: '3w', label: 'Three wires: voltages to the star point' },
];
const sides = [
  { value: 'proposed', label: 'As proposed' },
  { value: 'chosen', label: 'Chosen here' },
] as const;

const optionsOf = (channels: readonly Channel[], quantity: 'voltage' | 'current') => [
  { value: '', label: 'Choose' },
  ...channels
    .filter((channel) => channel.quantity === quantity)
    .map(({ index, name }) => ({ value: String(index), label: name })),
];

/** Which voltages and currents make a power: as proposed from the names of the channels, or chosen. */
export function PairingFields({ form, channels }: PairingFieldsProps) {
  const pairing = form.watch('pairing');
  return (
    <Stack gap="3">
      <Segmented
        label="Pairs and phases"
        value={pairing}
        options={sides}
        onChange={(value) => form.setValue('pairing', value)}
      />
      {pairing === 'proposed' ? (
        <Text fontSize="13px">{proposalWords(channels)}</Text>
      ) : (
        <>
          <PairRows form={form} channels={channels} />
          <SetRows form={form} channels={channels} />
        </>
      )}
      <Box maxW="16rem">
        <FormField
          label="Rated current, A"
          optional
          error={form.formState.errors.ratedCurrentA?.message}
          help="For the K-factor of a transformer’s nameplate."
        >
          <Input fontFamily="mono" inputMode="decimal" {...form.register('ratedCurrentA')} />
        </FormField>
      </Box>
    </Stack>
  );
}

function PairRows({ form, channels }: PairingFieldsProps) {
  const { fields, append, remove } = useFieldArray({ control: form.control, name: 'pairs' });
  const errors = form.formState.errors.pairs;
  const voltages = optionsOf(channels, 'voltage');
  const currents = optionsOf(channels, 'current');
  return (
    <Stack gap="2">
      {fields.length === 0 ? <Text color="inkSoft">No pairs: no power is computed.</Text> : null}
      {fields.map((field, index) => (
        <Grid key={field.id} gap="2" templateColumns="1fr 1fr 5rem auto" alignItems="end">
          <FormField label="Voltage" error={errors?.[index]?.voltage?.message}>
            <SelectInput options={voltages} {...form.register(`pairs.${index}.voltage`)} />
          </FormField>
          <FormField label="Current" error={errors?.[index]?.current?.message}>
            <SelectInput options={currents} {...form.register(`pairs.${index}.current`)} />
          </FormField>
          <FormField label="Phase">
            <SelectInput options={phases} {...form.register(`pairs.${index}.phase`)} />
          </FormField>
          <Button variant="ghost" aria-label={`Remove pair ${index + 1}`} onClick={() => remove(index)}>
            Remove
          </Button>
        </Grid>
      ))}
      <Flex>
        <Button size="xs" onClick={() => append({ voltage: '', current: '', phase: '' })}>
          Add a pair
        </Button>
      </Flex>
    </Stack>
  );
}

const emptyTriple = (): [string, string, string] => ['', '', ''];

function SetRows({ form, channels }: PairingFieldsProps) {
  const { fields, append, remove } = useFieldArray({ control: form.control, name: 'sets' });
  const errors = form.formState.errors.sets;
  const voltages = optionsOf(channels, 'voltage');
  const currents = optionsOf(channels, 'current');
  const isPossible = voltages.length > 3 && currents.length > 3;
  if (!isPossible && fields.length === 0) return null;
  const triple = ['0', '1', '2'] as const;
  return (
    <Stack gap="3">
      {fields.map((field, index) => (
        <Stack key={field.id} gap="2" borderLeftWidth="2px" borderColor="rule" pl="3">
          <Grid gap="2" templateColumns="repeat(3, 1fr)">
            {triple.map((phase) => (
              <FormField key={`u${phase}`} label={`Voltage of phase ${Number(phase) + 1}`}>
                <SelectInput options={voltages} {...form.register(`sets.${index}.voltages.${phase}`)} />
              </FormField>
            ))}
            {triple.map((phase) => (
              <FormField key={`i${phase}`} label={`Current of phase ${Number(phase) + 1}`}>
                <SelectInput options={currents} {...form.register(`sets.${index}.currents.${phase}`)} />
              </FormField>
            ))}
          </Grid>
          <Flex gap="2" align="end">
            <FormField label="Wires" error={errors?.[index]?.wires?.message}>
              <SelectInput options={wires} {...form.register(`sets.${index}.wires`)} />
            </FormField>
            <Button
              variant="ghost"
              aria-label={`Remove set of three phases ${index + 1}`}
              onClick={() => remove(index)}
            >
              Remove
            </Button>
          </Flex>
        </Stack>
      ))}
      {isPossible ? (
        <Flex>
          <Button
            size="xs"
            onClick={() => append({ voltages: emptyTriple(), currents: emptyTriple(), wires: '4w' })}
          >
            Add a set of three phases
          </Button>
        </Flex>
      ) : null}
    </Stack>
  );
}
