import { Field, Input, Textarea } from '@chakra-ui/react';
import { useState } from 'react';

interface TextValuesProps<T> {
  label: string;
  help?: string;
  value: T;
  write: (value: T) => string;
  read: (text: string) => { value: T } | { problem: string };
  rows?: number;
  disabled: boolean;
  onChange: (value: T) => void;
}

/** A value that is written as text; taken over on leaving the field once it can be read. */
export function TextValues<T>(props: TextValuesProps<T>) {
  const { label, help, value, write, read, rows, disabled, onChange } = props;
  const [draft, setDraft] = useState<string | null>(null);
  const outcome = draft === null ? null : read(draft);
  const problem = outcome !== null && 'problem' in outcome ? outcome.problem : null;
  const field = {
    size: 'xs' as const,
    fontFamily: 'mono',
    autoComplete: 'off',
    value: draft ?? write(value),
    onChange: (event: { target: { value: string } }) => setDraft(event.target.value),
    onBlur: () => {
      if (outcome === null || 'problem' in outcome) return;
      onChange(outcome.value);
      setDraft(null);
    },
  };
  return (
    <Field.Root invalid={problem !== null} disabled={disabled} gap="1">
      <Field.Label fontSize="13px">{label}</Field.Label>
      {rows ? <Textarea {...field} rows={rows} /> : <Input {...field} />}
      {help ? <Field.HelperText fontSize="xs">{help}</Field.HelperText> : null}
      <Field.ErrorText role="alert">{problem}</Field.ErrorText>
    </Field.Root>
  );
}
