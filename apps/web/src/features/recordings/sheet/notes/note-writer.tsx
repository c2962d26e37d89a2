import { Button, Text } from '@chakra-ui/react';
import type { CreateNote } from '@overtally/contracts';
import { MarginItem } from '../../../../components/margin-column.js';
import type { Span } from '../../charts/span.js';
import { useNoteChanges } from '../../hooks/use-note-changes.js';
import type { NoteTarget } from '../note-target.js';
import { NoteForm } from './note-form.js';

interface NoteWriterProps {
  analysisId: string;
  channel: number;
  orders: readonly number[];
  /** What is selected in a figure; the form begins with it. */
  target: NoteTarget | null;
  view: Span;
  writing: boolean;
  onWriting: (writing: boolean) => void;
}

/** The form for a note, or the way to it. */
export function NoteWriter(props: NoteWriterProps) {
  const { analysisId, channel, orders, target, view, writing, onWriting } = props;
  const { create } = useNoteChanges(analysisId);
  const close = () => {
    onWriting(false);
    create.reset();
  };
  if (writing) {
    return (
      <NoteForm
        channel={channel}
        target={target}
        view={view}
        orders={orders}
        pending={create.isPending}
        error={create.error}
        onAdd={(note: CreateNote) => create.mutate(note, { onSuccess: close })}
        onCancel={close}
      />
    );
  }
  return (
    <MarginItem>
      <Text color="inkSoft" mb="2">
        A note speaks of an order, a line or a time span. Select one in a figure, or name it.
      </Text>
      <Button size="xs" onClick={() => onWriting(true)}>
        Add a note
      </Button>
    </MarginItem>
  );
}
