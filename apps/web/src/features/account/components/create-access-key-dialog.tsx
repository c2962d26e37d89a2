import { Button, Input, Stack } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import { createAccessKeySchema, type CreatedAccessKey } from '@overtally/contracts';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { z } from 'zod';
import { FormField, SelectInput } from '../../../components/form-field.js';
import { FormProblem } from '../../../components/form-problem.js';
import { Modal } from '../../../components/modal.js';
import { setFormProblem } from '../../../lib/form-errors.js';
import { useAccessKeyChanges } from '../hooks/use-access-key-changes.js';
import { NewSecret } from './new-secret.js';

interface CreateAccessKeyDialogProps {
  open: boolean;
  onClose: () => void;
}

/** Makes a key, then shows its secret until the dialog is closed. */
export function CreateAccessKeyDialog({ open, onClose }: CreateAccessKeyDialogProps) {
  const [made, setMade] = useState<CreatedAccessKey>();
  const close = () => {
    setMade(undefined);
    onClose();
  };
  return (
    <Modal open={open} onClose={close} title={made ? made.name : 'New access key'}>
      {made ? (
        <NewSecret secret={made.secret} onClose={close} />
      ) : (
        <CreateAccessKeyForm onMade={setMade} onClose={close} />
      )}
    </Modal>
  );
}

const forever = 'forever';
const lifetimes = [
  { value: '30', label: '30 days' },
  { value: '90', label: '90 days' },
  { value: '365', label: 'a year' },
  { value: forever, label: 'until it is removed' },
];
const formSchema = z.object({ name: createAccessKeySchema.shape.name, expiresInDays: z.string() });

function CreateAccessKeyForm(props: { onMade: (key: CreatedAccessKey) => void; onClose: () => void }) {
  const form = useForm({
    resolver: zodResolver(formSchema),
    defaultValues: { name: '', expiresInDays: '90' },
  });
  const { errors } = form.formState;
  const { create } = useAccessKeyChanges();
  const submit = form.handleSubmit(({ name, expiresInDays }) =>
    create.mutate(expiresInDays === forever ? { name } : { name, expiresInDays: Number(expiresInDays) }, {
      onSuccess: props.onMade,
      onError: (error) => setFormProblem(form, error),
    }),
  );
  return (
    <form noValidate onSubmit={submit}>
      <Stack gap="4">
        <FormProblem message={errors.root?.message} />
        <FormField
          label="Name"
          help="What the key is for, such as the bench computer."
          error={errors.name?.message}
        >
          <Input autoComplete="off" {...form.register('name')} />
        </FormField>
        <FormField label="Valid for" error={errors.expiresInDays?.message}>
          <SelectInput options={lifetimes} {...form.register('expiresInDays')} />
        </FormField>
        <Stack direction="row" justify="flex-end" gap="2">
          <Button onClick={props.onClose}>Cancel</Button>
          <Button type="submit" variant="solid" loading={create.isPending}>
            Make key
          </Button>
        </Stack>
      </Stack>
    </form>
  );
}
