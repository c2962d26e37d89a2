import type { ChannelAnalysis, Note } from '@overtally/contracts';
import { notifyProblem } from '../../../../components/notify.js';
import { formatPercent } from '../../../../lib/format.js';
import type { LetteredNote } from '../../charts/note-letters.js';
import type { OrderRow } from '../../charts/order-rows.js';
import { fundamentalSymbol } from '../../charts/words.js';
import { useNoteChanges } from '../../hooks/use-note-changes.js';
import { NoteItem } from './note-item.js';

interface NoteItemsProps {
  analysisId: string;
  channel: ChannelAnalysis;
  channelNames: ReadonlyMap<number, string>;
  rows: readonly OrderRow[];
  /** Those of one place in the margin. */
  notes: readonly LetteredNote[];
  onShow: (note: Note) => void;
  mayChange: (note: Note) => boolean;
}

/** Notes of the analysis in the order of writing. */
export function NoteItems(props: NoteItemsProps) {
  const { update, remove } = useNoteChanges(props.analysisId);
  return props.notes.map(({ letter, note }) => (
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
  ));
}

function aboutWords(note: Note, { channel, channelNames, rows }: NoteItemsProps): string | null {
  if (note.channel !== channel.index) return channelNames.get(note.channel) ?? null;
  const { target } = note;
  if (target.kind !== 'order') return null;
  const row = rows.find((candidate) => candidate.order === target.order);
  if (!row) return null;
  if (row.sharePercent !== null) return `${formatPercent(row.sharePercent, 0)} of its limit`;
  if (row.order === 1 || row.percentOfFundamental === null) return null;
  return `${formatPercent(row.percentOfFundamental)} of ${fundamentalSymbol(channel.quantity)}`;
}
