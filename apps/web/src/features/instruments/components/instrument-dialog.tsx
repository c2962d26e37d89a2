import { Button, Checkbox, Grid, Input, Stack, Textarea } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import { createInstrumentSchema, instrumentKindSchema, type Instrument } from '@overtally/contracts';
import { useForm } from 'react-hook-form';
import { z } from 'zod';
import { FormField, SelectInput } from '../../../components/form-field.js';
import { FormProblem } from '../../../components/form-problem.js';
import { Modal } from '../../../components/modal.js';
import { notifyDone } from '../../../components/notify.js';
import { setFormProblem } from '../../../lib/form-errors.js';
import { useLaboratoryChanges } from '../hooks/use-laboratory-changes.js';
import { kindWords } from '../instrument-words.js';

interface InstrumentDialogProps {
  /** What is changed; null for a new instrument. */
  instrument: Instrument | null;
  /** Who is at the screen and may look after it. */
  account: { id: string; name: string };
  open: boolean;
  onClose: () => void;
  onSaved?: (instrument: Instrument) => void;
}

const kinds = instrumentKindSchema.options.map((value) => ({ value, label: kindWords[value] }));

const formSchema = z.object({
  ...createInstrumentSchema.omit({ responsibleId: true }).required().shape,
  isMine: z.boolean(),
});

/** What an instrument is, and whether the person at the screen looks after it. */
export function InstrumentDialog({ open, onClose, ...props }: InstrumentDialogProps) {
  const title = props.instrument ? `Edit ${props.instrument.name}` : 'New instrument';
  return (
    <Modal open={open} onClose={onClose} title={title} size="lg">
      <InstrumentForm onClose={onClose} {...props} />
    </Modal>
  );
}

function InstrumentForm({ instrument, account, onClose, onSaved }: Omit<InstrumentDialogProps, 'open'>) {
  const { kind = 'current-transducer', name = '', manufacturer = '', model = '' } = instrument ?? {};
  const { serialNumber = '', remark = '', responsible = null } = instrument ?? {};
  const form = useForm({
    resolver: zodResolver(formSchema),
    defaultValues: {
      ...{ kind, name, manufacturer, model, serialNumber, remark },
      isMine: responsible?.id === account.id,
    },
  });
  const { errors } = form.formState;
  const { saveInstrument } = useLaboratoryChanges();
  const submit = form.handleSubmit(({ isMine, ...values }) => {
    const other = responsible?.id === account.id ? null : (responsible?.id ?? null);
    saveInstrument.mutate(
      { id: instrument?.id ?? null, values: { ...values, responsibleId: isMine ? account.id : other } },
      {
        onSuccess: (saved) => {
          notifyDone(`${saved.name} ${instrument ? 'saved' : 'entered'}`);
          onClose();
          onSaved?.(saved);
        },
        onError: (error) => setFormProblem(form, error),
      },
    );
  });
  const others = responsible && responsible.id !== account.id ? `; now it is ${responsible.name}` : '';
  return (
    <form noValidate onSubmit={submit}>
      <Stack gap="4">
        <FormProblem message={errors.root?.message} />
        <Grid gap="4" templateColumns={{ base: '1fr', md: '1fr 1fr' }}>
          <FormField label="Name" error={errors.name?.message}>
            <Input autoComplete="off" {...form.register('name')} />
          </FormField>
          <FormField label="Kind" error={errors.kind?.message}>
            <SelectInput options={kinds} {...form.register('kind')} />
          </FormField>
          <FormField label="Manufacturer" optional error={errors.manufacturer?.message}>
            <Input autoComplete="off" {...form.register('manufacturer')} />
          </FormField>
          <FormField label="Model" optional error={errors.model?.message}>
            <Input autoComplete="off" {...form.register('model')} />
          </FormField>
          <FormField label="Serial or inventory number" error={errors.serialNumber?.message}>
            <Input autoComplete="off" {...form.register('serialNumber')} />
          </FormField>
        </Grid>
        <FormField label="Remark" optional error={errors.remark?.message}>
          <Textarea rows={2} {...form.register('remark')} />
        </FormField>
        <Checkbox.Root size="sm">
          <Checkbox.HiddenInput {...form.register('isMine')} />
          <Checkbox.Control borderColor="edge" />
          <Checkbox.Label fontWeight="400">
            {`I look after it and am told when calibration is due${others}`}
          </Checkbox.Label>
        </Checkbox.Root>
        <Stack direction="row" justify="flex-end" gap="2">
          <Button onClick={onClose}>Cancel</Button>
          <Button type="submit" variant="solid" loading={saveInstrument.isPending}>
            {instrument ? 'Save' : 'Enter instrument'}
          </Button>
        </Stack>
      </Stack>
    </form>
  );
}
