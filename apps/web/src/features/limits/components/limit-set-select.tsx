import { NativeSelect } from '@chakra-ui/react';
import type { LimitSet } from '@overtally/contracts';
import { limitSetChoice } from '../../../lib/limit-set-name.js';
import { quantityWords } from '../limit-words.js';

interface LimitSetSelectProps {
  /** Sets that fit what is judged. */
  fitting: readonly LimitSet[];
  others: readonly LimitSet[];
  value: string;
  onChange: (limitSetId: string) => void;
}

/** Choice of a limit set, those that fit first; inside a `FormField` it takes its label. */
export function LimitSetSelect({ fitting, others, value, onChange }: LimitSetSelectProps) {
  return (
    <NativeSelect.Root>
      <NativeSelect.Field value={value} onChange={(event) => onChange(event.target.value)}>
        {fitting.length > 0 ? (
          <optgroup label="For this channel">
            {fitting.map((set) => (
              <option key={set.id} value={set.id}>
                {limitSetChoice(set)}
              </option>
            ))}
          </optgroup>
        ) : null}
        {others.length > 0 ? (
          <optgroup label="For other quantities">
            {others.map((set) => (
              <option key={set.id} value={set.id}>
                {`${limitSetChoice(set)} (${quantityWords[set.quantity].toLowerCase()})`}
              </option>
            ))}
          </optgroup>
        ) : null}
      </NativeSelect.Field>
      <NativeSelect.Indicator />
    </NativeSelect.Root>
  );
}
