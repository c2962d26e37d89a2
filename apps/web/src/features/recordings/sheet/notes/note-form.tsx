import { Button, Flex, Input, Stack, Textarea } from '@chakra-ui/react';
import type { CreateNote } from '@overtally/contracts';
import { useEffect, useRef, useState, type FormEvent } from 'react';
import { FormField } from '../../../../components/form-field.js';
import { FormProblem } from '../../../../components/form-problem.js';
import { problemText } from '../../../../lib/api-problem.js';
import type { Span } from '../../charts/span.js';
import type { NoteTarget } from '../note-target.js';
import { TargetFields } from './target-fields.js';
import { toTarget, toTargetValues } from './target-values.js';

interface NoteFormProps {
  channel: number;
  /** Selected in a figure; null: nothing yet. */
  target: NoteTarget | null;
  view: Span;
  orders: readonly number[];
  pending: boolean;
  error: unknown;
  onAdd: (note: CreateNote) => void;
  onCancel: () => void;
}

/** Form for a new note in the margin. */
export function NoteForm({ channel, target, view, orders, pending, error, onAdd, onCancel }: NoteFormProps) {
  const [values, setValues] = useState(() => toTargetValues(target, view));
  const [text, setText] = useState('');
  const [cause, setCause] = useState('');
  const [tried, setTried] = useState(false);
  const field = useRef<HTMLTextAreaElement>(null);
  const [filledFrom, setFilledFrom] = useState(target);
  // A click in a figure while the form is open changes what the note speaks of, and leaves its text.
  if (target !== filledFrom) {
    setFilledFrom(target);
    if (target) setValues(toTargetValues(target, view));
  }
  useEffect(() => {
    if (target) field.current?.focus({ preventScroll: true });
  }, [target]);
  const chosen = toTarget(values);
  const problem = 'problem' in chosen ? chosen.problem : undefined;
  const submit = (event: FormEvent) => {
    event.preventDefault();
    setTried(true);
    if ('problem' in chosen || text.trim() === '') return;
    onAdd({ channel, target: chosen, text: text.trim(), cause: cause.trim() });
  };
  return (
    <form noValidate onSubmit={submit} aria-label="New note">
      <Stack gap="3" py="3" borderBottomWidth="1px" borderColor="rule">
        <FormProblem message={error ? problemText(error) : undefined} />
        <TargetFields
          values={values}
          onChange={setValues}
          orders={orders}
          problem={tried ? problem : undefined}
        />
        <FormField label="Note" error={tried && text.trim() === '' ? 'Write the note' : undefined}>
          <Textarea
            ref={field}
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
          <Button size="xs" onClick={onCancel}>
            Cancel
          </Button>
          <Button size="xs" variant="solid" type="submit" loading={pending}>
            Add note
          </Button>
        </Flex>
      </Stack>
    </form>
  );
}
