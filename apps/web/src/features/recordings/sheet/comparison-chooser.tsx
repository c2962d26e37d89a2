import { chakra, Flex } from '@chakra-ui/react';
import type { LimitSet } from '@overtally/contracts';
import { useId } from 'react';
import { SelectInput } from '../../../components/form-field.js';

interface ComparisonChooserProps {
  /** Sets of the channel's quantity. */
  sets: readonly LimitSet[];
  value: string;
  onChange: (limitSetId: string) => void;
}

/** The limit set drawn as the ceiling. */
export function ComparisonChooser({ sets, value, onChange }: ComparisonChooserProps) {
  const id = useId();
  if (sets.length === 0) return null;
  return (
    <Flex align="center" gap="2" minW="0">
      <chakra.label htmlFor={id} color="inkSoft" fontSize="13px" whiteSpace="nowrap">
        Compared with
      </chakra.label>
      <SelectInput
        id={id}
        width="64"
        options={[
          { value: '', label: 'No limits' },
          ...sets.map((set) => ({
            value: set.id,
            label: set.title,
          })),
        ]}
        value={value}
        onChange={(event) => onChange(event.target.value)}
      />
    </Flex>
  );
}
