import { Button, Flex, Input, Stack, Text, Textarea } from '@chakra-ui/react';
import type { Note, UpdateNote } from '@overtally/contracts';
import { useState } from 'react';
import { FormField } from '../../../../components/form-field.js';
import { MarginItem } from '../../../../components/margin-column.js';
import { formatDate, formatDateTimeFull } from '../../../../lib/format-date.js';
import { targetWords } from '../note-target.js';

interface NoteItemProps {
  letter: string;
  note: Note;
  /** Said after the target: "113 % of its limit", "53.7 % of I₁", or another channel's name. */
  about: string | null;
  mayChange: boolean;
  pending: boolean;
  onShow: () => void;
  onSave: (change: UpdateNote) => Promise<unknown>;
  onDelete: () => void;
}

/** One note of the margin, under the letter that stands in the figure. */
export function NoteItem(props: NoteItemProps) {
  const { letter, note, about, mayChange } = props;
  const [editing, setEditing] = useState(false);
  const edited = note.updatedAt !== note.createdAt;
  return (
    <MarginItem
      letter={letter}
      title={about ? `${targetWords(note.target)}, ${about}` : targetWords(note.target)}
      foot={
        editing ? undefined : (
          <span title={formatDateTimeFull(note.updatedAt)}>
            {note.author.name}, {formatDate(note.createdAt)}
            {edited ? ', changed' : ''}
          </span>
        )
      }
    >
      {editing ? (
        <EditNote {...props} onClose={() => setEditing(false)} />
      ) : (
        <>
          <Text whiteSpace="pre-wrap" overflowWrap="anywhere">
            {note.text}
          </Text>
          {note.cause ? <Text color="inkSoft">Cause: {note.cause}</Text> : null}
          <Flex gap="1" ml="-2">
            <Button
              size="2xs"
              variant="ghost"
              onClick={props.onShow}
              aria-label={`Show note ${letter} in the figure`}
            >
              Show
            </Button>
            {mayChange ? (
              <>
                <Button
                  size="2xs"
                  variant="ghost"
                  onClick={() => setEditing(true)}
                  aria-label={`Edit note ${letter}`}
                >
                  Edit
                </Button>
                <Button
                  size="2xs"
                  variant="ghost"
                  onClick={props.onDelete}
                  aria-label={`Delete note ${letter}`}
                >
                  Delete
                </Button>
              </>
            ) : null}
          </Flex>
        </>
      )}
    </MarginItem>
  );
}

function EditNote({ note, pending, onSave, onClose }: NoteItemProps & { onClose: () => void }) {
  const [text, setText] = useState(note.text);
  const [cause, setCause] = useState(note.cause);
  const empty = text.trim() === '';
  const save = () => onSave({ text: text.trim(), cause: cause.trim() }).then(onClose, () => undefined);
  return (
    <Stack gap="2" py="1">
      <FormField label="Note" error={empty ? 'Write the note' : undefined}>
        <Textarea
          autoFocus
          rows={3}
          maxLength={2000}
          value={text}
          onChange={(event) => setText(event.target.value)}
        />
      </FormField>
      <FormField label="Cause" optional>
        <Input maxLength={200} value={cause} onChange={(event) => setCause(event.target.value)} />
      </FormField>
      <Flex gap="2" justify="flex-end">
        <Button size="xs" onClick={onClose}>
          Cancel
        </Button>
        <Button size="xs" variant="solid" disabled={empty} loading={pending} onClick={() => void save()}>
          Save
        </Button>
      </Flex>
    </Stack>
  );
}
