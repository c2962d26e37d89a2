import type { ComponentUnit } from '@overtally/dsp';
import { readValue, valueText } from '../stages/value-text.js';
import { TextValues } from './text-values.js';

interface RangeEndProps {
  label: string;
  unit: ComponentUnit | '';
  value: number;
  onChange: (value: number) => void;
}

/** One end of a range, written with prefix and unit. */
export function RangeEnd({ label, unit, value, onChange }: RangeEndProps) {
  return (
    <TextValues
      label={label}
      value={value}
      disabled={false}
      write={(held) => valueText(held, unit)}
      read={(text) => {
        const read = readValue(text, { name: label, symbol: label, unit, meaning: label, range: 'any' });
        return read.problem !== null ? { problem: read.problem } : { value: read.value ?? 0 };
      }}
      onChange={onChange}
    />
  );
}
