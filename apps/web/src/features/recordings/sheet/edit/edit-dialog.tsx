import { Button, Grid, GridItem, Input, Stack, Text, Textarea } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import type { Recording } from '@overtally/contracts';
import { Controller, useForm } from 'react-hook-form';
import { FormField } from '../../../../components/form-field.js';
import { FormProblem } from '../../../../components/form-problem.js';
import { Modal } from '../../../../components/modal.js';
import { notifyDone } from '../../../../components/notify.js';
import { setFormProblem } from '../../../../lib/form-errors.js';
import { BenchFields } from '../../bench/bench-fields.js';
import type { BenchValues } from '../../bench/bench-values.js';
import { useRecordingChanges } from '../../hooks/use-recording-changes.js';
import { ChannelFields } from './channel-fields.js';
import { editSchema, toEditValues, toUpdate, type EditValues } from './edit-values.js';

interface EditDialogProps {
  recording: Recording;
  open: boolean;
  onClose: () => void;
}

/** Bench data and scaling of a recording. The source and its samples never change. */
export function EditDialog({ recording, open, onClose }: EditDialogProps) {
  return (
    <Modal open={open} onClose={onClose} title={`Edit ${recording.number}`} size="xl">
      <EditForm recording={recording} onClose={onClose} />
    </Modal>
  );
}

const texts = [
  { key: 'name', label: 'Name', optional: false },
  { key: 'eut', label: 'Equipment under test', optional: true },
  { key: 'measuringChain', label: 'Measuring chain', optional: true },
  { key: 'instrument', label: 'Recording instrument', optional: true },
] as const;

function EditForm({ recording, onClose }: Omit<EditDialogProps, 'open'>) {
  const form = useForm<EditValues>({
    resolver: zodResolver(editSchema),
    defaultValues: toEditValues(recording),
  });
  const { errors } = form.formState;
  const { update } = useRecordingChanges(recording);
  const save = form.handleSubmit((values) => {
    const change = toUpdate(values, recording);
    update.mutate(change, {
      onSuccess: () => {
        notifyDone(change.channels ? 'Saved; the recording is analysed again' : 'Saved');
        onClose();
      },
      onError: (error) => setFormProblem(form, error),
    });
  });
  return (
    <form noValidate onSubmit={save}>
      <Stack gap="5">
        <FormProblem message={errors.root?.message} />
        <Grid gap="4" templateColumns={{ base: '1fr', md: '1fr 1fr' }}>
          {texts.map(({ key, label, optional }) => (
            <FormField key={key} label={label} optional={optional} error={errors[key]?.message}>
              <Input autoComplete="off" {...form.register(key)} />
            </FormField>
          ))}
          <FormField
            label="Captured at"
            optional
            error={errors.capturedAt?.message}
            help="In your time zone."
          >
            <Input type="datetime-local" step="1" {...form.register('capturedAt')} />
          </FormField>
          <GridItem colSpan={{ base: 1, md: 2 }}>
            <FormField label="Remark" optional error={errors.remark?.message}>
              <Textarea rows={2} {...form.register('remark')} />
            </FormField>
          </GridItem>
        </Grid>
        <Controller
          control={form.control}
          name="bench"
          render={({ field }) => (
            <BenchFields
              projectId={recording.projectId}
              recording={recording}
              values={field.value}
              errors={messagesOf(errors.bench)}
              onChange={field.onChange}
            />
          )}
        />
        {recording.channels.length > 0 ? (
          <Stack gap="3">
            <Text color="inkSoft" fontSize="13px">
              Value in the unit = gain × stored value + offset. A change here analyses the recording again;
              earlier analyses stay and are marked as superseded.
            </Text>
            {recording.channels.map((channel, at) => (
              <ChannelFields key={channel.index} form={form} at={at} />
            ))}
          </Stack>
        ) : null}
        <Stack direction="row" justify="flex-end" gap="2">
          <Button onClick={onClose}>Cancel</Button>
          <Button type="submit" variant="solid" loading={update.isPending}>
            Save
          </Button>
        </Stack>
      </Stack>
    </form>
  );
}

function messagesOf(
  errors: Partial<Record<keyof BenchValues, { message?: string }>> | undefined,
): Partial<Record<keyof BenchValues, string | undefined>> {
  return Object.fromEntries(Object.entries(errors ?? {}).map(([key, error]) => [key, error?.message]));
}
