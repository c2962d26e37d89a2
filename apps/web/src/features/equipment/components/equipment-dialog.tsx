import { Button, Grid, GridItem, Heading, Input, Stack, Textarea } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import type { Equipment } from '@overtally/contracts';
import { useForm } from 'react-hook-form';
import { FormField, SelectInput } from '../../../components/form-field.js';
import { FormProblem } from '../../../components/form-problem.js';
import { Modal } from '../../../components/modal.js';
import { notifyDone } from '../../../components/notify.js';
import { setFormProblem } from '../../../lib/form-errors.js';
import { equipmentFormSchema, toEquipment, toForm } from '../equipment-values.js';
import { useEquipmentChanges } from '../hooks/use-equipment-changes.js';
import { ModeFields } from './mode-fields.js';

interface EquipmentDialogProps {
  projectId: string;
  /** What is changed; null for new equipment. */
  equipment: Equipment | null;
  open: boolean;
  onClose: () => void;
}

/** Name, rating plate and operating modes of equipment under test. */
export function EquipmentDialog({ open, onClose, equipment, projectId }: EquipmentDialogProps) {
  const title = equipment ? `Edit ${equipment.name}` : 'New equipment';
  return (
    <Modal open={open} onClose={onClose} title={title} size="xl">
      <EquipmentFields projectId={projectId} equipment={equipment} onClose={onClose} />
    </Modal>
  );
}

const words = [
  { key: 'name', label: 'Name', optional: false },
  { key: 'manufacturer', label: 'Manufacturer', optional: true },
  { key: 'model', label: 'Model', optional: true },
  { key: 'serialNumber', label: 'Serial number', optional: true },
] as const;

const amounts = [
  { key: 'voltageV', label: 'Voltage, V' },
  { key: 'frequencyHz', label: 'Frequency, Hz' },
  { key: 'currentA', label: 'Current per phase, A' },
  { key: 'powerW', label: 'Active power, W' },
] as const;

const phases = [
  { value: '', label: 'Not stated' },
  ...['1', '2', '3'].map((value) => ({ value, label: value })),
];
const classes = [
  { value: '', label: 'Not stated' },
  ...['A', 'B', 'C', 'D'].map((value) => ({ value, label: `Class ${value}` })),
];

function EquipmentFields({ projectId, equipment, onClose }: Omit<EquipmentDialogProps, 'open'>) {
  const form = useForm({ resolver: zodResolver(equipmentFormSchema), defaultValues: toForm(equipment) });
  const { errors } = form.formState;
  const { save } = useEquipmentChanges(projectId);
  const submit = form.handleSubmit((values) =>
    save.mutate(
      { before: equipment, values: toEquipment(values) },
      {
        onSuccess: ({ name }) => {
          notifyDone(equipment ? `${name} saved` : `${name} entered`);
          onClose();
        },
        onError: (error) => setFormProblem(form, error),
      },
    ),
  );
  return (
    <form noValidate onSubmit={submit}>
      <Stack gap="5">
        <FormProblem message={errors.root?.message} />
        <Grid gap="4" templateColumns={{ base: '1fr', md: '1fr 1fr' }}>
          {words.map(({ key, label, optional }) => (
            <FormField key={key} label={label} optional={optional} error={errors[key]?.message}>
              <Input autoComplete="off" {...form.register(key)} />
            </FormField>
          ))}
        </Grid>
        <Stack as="fieldset" gap="3" borderWidth="1px" borderColor="ruleStrong" borderRadius="3px" p="3">
          <Heading as="legend" fontSize="sm" px="1">
            Rating plate
          </Heading>
          <Grid gap="3" templateColumns={{ base: '1fr 1fr', md: 'repeat(3, 1fr)' }} alignItems="end">
            {amounts.map(({ key, label }) => (
              <FormField key={key} label={label} error={errors[key]?.message}>
                <Input inputMode="decimal" fontFamily="mono" autoComplete="off" {...form.register(key)} />
              </FormField>
            ))}
            <FormField label="Phases" error={errors.phases?.message}>
              <SelectInput options={phases} {...form.register('phases')} />
            </FormField>
            <FormField label="Emission class" error={errors.emissionClass?.message}>
              <SelectInput options={classes} {...form.register('emissionClass')} />
            </FormField>
          </Grid>
        </Stack>
        <ModeFields form={form} />
        <Grid gap="4" templateColumns={{ base: '1fr', md: '1fr 2fr' }}>
          <FormField label="Received on" optional error={errors.receivedOn?.message}>
            <Input type="date" {...form.register('receivedOn')} />
          </FormField>
          <GridItem>
            <FormField label="Remark" optional error={errors.remark?.message}>
              <Textarea rows={2} {...form.register('remark')} />
            </FormField>
          </GridItem>
        </Grid>
        <Stack direction="row" justify="flex-end" gap="2">
          <Button onClick={onClose}>Cancel</Button>
          <Button type="submit" variant="solid" loading={save.isPending}>
            {equipment ? 'Save' : 'Enter equipment'}
          </Button>
        </Stack>
      </Stack>
    </form>
  );
}
