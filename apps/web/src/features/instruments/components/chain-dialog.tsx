import { Button, Input, Stack, Textarea } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import { writeChainSchema, type Instrument, type MeasuringChainListItem } from '@overtally/contracts';
import { Controller, useForm } from 'react-hook-form';
import { FormField } from '../../../components/form-field.js';
import { FormProblem } from '../../../components/form-problem.js';
import { Modal } from '../../../components/modal.js';
import { notifyDone } from '../../../components/notify.js';
import { setFormProblem } from '../../../lib/form-errors.js';
import { useLaboratoryChanges } from '../hooks/use-laboratory-changes.js';
import { ChainOrder } from './chain-order.js';

interface ChainDialogProps {
  /** What is changed, or copied where recordings were made through it; null for a new chain. */
  chain: MeasuringChainListItem | null;
  copies: boolean;
  instruments: readonly Instrument[];
  open: boolean;
  onClose: () => void;
}

/** Puts instruments together to a measuring chain. */
export function ChainDialog({ open, onClose, ...props }: ChainDialogProps) {
  const title = props.chain ? `${props.copies ? 'Copy' : 'Edit'} ${props.chain.name}` : 'New measuring chain';
  return (
    <Modal open={open} onClose={onClose} title={title} size="lg">
      <ChainForm onClose={onClose} {...props} />
    </Modal>
  );
}

function ChainForm({ chain, copies, instruments, onClose }: Omit<ChainDialogProps, 'open'>) {
  const form = useForm({
    resolver: zodResolver(writeChainSchema),
    defaultValues: {
      name: chain ? (copies ? `${chain.name}, copy` : chain.name) : '',
      description: chain?.description ?? '',
      instrumentIds: chain?.instruments.map(({ id }) => id) ?? [],
    },
  });
  const { errors } = form.formState;
  const { saveChain } = useLaboratoryChanges();
  const isFixed = !copies && (chain?.recordings ?? 0) > 0;
  const submit = form.handleSubmit((values) =>
    saveChain.mutate(
      { id: copies ? null : (chain?.id ?? null), values },
      {
        onSuccess: ({ name }) => {
          notifyDone(`${name} saved`);
          onClose();
        },
        onError: (error) => setFormProblem(form, error),
      },
    ),
  );
  const orderError = errors.instrumentIds;
  return (
    <form noValidate onSubmit={submit}>
      <Stack gap="4">
        <FormProblem message={errors.root?.message} />
        <FormField label="Name" error={errors.name?.message}>
          <Input autoComplete="off" {...form.register('name')} />
        </FormField>
        <Controller
          control={form.control}
          name="instrumentIds"
          render={({ field }) => (
            <ChainOrder
              instruments={instruments}
              chosen={field.value}
              onChange={field.onChange}
              isFixed={isFixed}
              error={orderError?.message ?? orderError?.find?.((each) => each?.message)?.message}
            />
          )}
        />
        <FormField label="Description" optional error={errors.description?.message}>
          <Textarea rows={2} {...form.register('description')} />
        </FormField>
        <Stack direction="row" justify="flex-end" gap="2">
          <Button onClick={onClose}>Cancel</Button>
          <Button type="submit" variant="solid" loading={saveChain.isPending}>
            {chain && !copies ? 'Save' : 'Make chain'}
          </Button>
        </Stack>
      </Stack>
    </form>
  );
}
