import { Button, Text } from '@chakra-ui/react';
import type { ChannelAnalysis, CreateNote, Note } from '@overtally/contracts';
import { useState } from 'react';
import { MarginItem } from '../../../../components/margin-column.js';
import { notifyProblem } from '../../../../components/notify.js';
import { formatPercent } from '../../../../lib/format.js';
import type { LetteredNote } from '../../charts/note-letters.js';
import type { OrderRow } from '../../charts/order-rows.js';
import type { Span } from '../../charts/span.js';
import { fundamentalSymbol } from '../../charts/words.js';
import { useNoteChanges } from '../../hooks/use-note-changes.js';
import type { NoteTarget } from '../note-target.js';
import { NoteForm } from './note-form.js';
import { NoteItem } from './note-item.js';

interface NotesMarginProps {
  analysisId: string;
  channel: ChannelAnalysis;
  channelNames: ReadonlyMap<number, string>;
  rows: readonly OrderRow[];
  notes: readonly LetteredNote[];
  target: NoteTarget | null;
  onTarget: (target: NoteTarget | null) => void;
  onShow: (note: Note) => void;
  view: Span;
  mayWrite: boolean;
  mayChange: (note: Note) => boolean;
}

/** Notes of the analysis in the order of writing, and the form for another. */
export function NotesMargin(props: NotesMarginProps) {
  const { analysisId, channel, rows, notes, target, onTarget, mayWrite } = props;
  const { create, update, remove } = useNoteChanges(analysisId);
  const [asked, setAsked] = useState(false);
  const writing = mayWrite && (asked || target !== null);
  const close = () => {
    setAsked(false);
    onTarget(null);
    create.reset();
  };
  return (
    <>
      {notes.map(({ letter, note }) => (
        <NoteItem
          key={note.id}
          letter={letter}
          note={note}
          about={aboutWords(note, props)}
          mayChange={props.mayChange(note)}
          pending={update.isPending}
          onShow={() => props.onShow(note)}
          onSave={(change) =>
            update.mutateAsync(
              { id: note.id, change },
              { onError: (error) => notifyProblem('The note was not changed', error) },
            )
          }
          onDelete={() => remove.mutate(note)}
        />
      ))}
      {writing ? (
        <NoteForm
          channel={channel.index}
          target={target}
          view={props.view}
          orders={rows.map((row) => row.order)}
          pending={create.isPending}
          error={create.error}
          onAdd={(note: CreateNote) => create.mutate(note, { onSuccess: close })}
          onCancel={close}
        />
      ) : null}
      {mayWrite && !writing ? (
        <MarginItem>
          <Text color="inkSoft" mb="2">
            Select an order or a line in the figure to add a note.
          </Text>
          <Button size="xs" onClick={() => setAsked(true)}>
            Add a note
          </Button>
        </MarginItem>
      ) : null}
      {!mayWrite && notes.length === 0 ? (
        <MarginItem>
          <Text color="inkSoft">No notes.</Text>
        </MarginItem>
      ) : null}
    </>
  );
}

function aboutWords(note: Note, { channel, channelNames, rows }: NotesMarginProps): string | null {
  if (note.channel !== channel.index) return channelNames.get(note.channel) ?? null;
  const { target } = note;
  if (target.kind !== 'order') return null;
  const row = rows.find((candidate) => candidate.order === target.order);
  if (!row) return null;
  if (row.sharePercent !== null) return `${formatPercent(row.sharePercent, 0)} of its limit`;
  if (row.order === 1 || row.percentOfFundamental === null) return null;
  return `${formatPercent(row.percentOfFundamental)} of ${fundamentalSymbol(channel.quantity)}`;
}
