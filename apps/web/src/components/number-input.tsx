import { Input, type InputProps } from '@chakra-ui/react';
import { useState } from 'react';
import { numberOf, numberText } from '../lib/number-text.js';

interface NumberInputProps extends Omit<InputProps, 'value' | 'onChange' | 'min' | 'max'> {
  value: number;
  /** Smallest and largest value taken. */
  min: number;
  max: number;
  onChange: (value: number) => void;
}

/** A number that is taken over with Enter or on leaving the field; Escape and what cannot be taken go back to `value`. */
export function NumberInput({ value, min, max, onChange, ...props }: NumberInputProps) {
  const [draft, setDraft] = useState<string | null>(null);
  const typed = draft === null ? value : numberOf(draft);
  const isFit = typed !== undefined && typed >= min && typed <= max;
  const commit = () => {
    if (draft !== null && isFit && typed !== value) onChange(typed);
    setDraft(null);
  };
  return (
    <Input
      fontFamily="mono"
      inputMode="decimal"
      {...props}
      value={draft ?? numberText(value, 6)}
      aria-invalid={isFit ? undefined : true}
      onChange={(event) => setDraft(event.target.value)}
      onBlur={commit}
      onKeyDown={(event) => {
        if (event.key === 'Enter') {
          event.preventDefault();
          commit();
        }
        if (event.key === 'Escape') setDraft(null);
      }}
    />
  );
}
