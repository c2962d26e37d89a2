import { chakra, Flex, Text } from '@chakra-ui/react';
import type { ReactNode } from 'react';
import { NumberInput } from './number-input.js';

export interface Range {
  from: number;
  to: number;
}

interface RangeFieldsProps {
  /** What is ranged over: "Frequencies shown". */
  label: string;
  unit: string;
  range: Range;
  /** Ends that the range cannot pass. */
  limits: Range;
  onChange: (range: Range) => void;
  /** Buttons for ranges that are often wanted. */
  presets?: ReactNode;
}

/** The part of an axis that is shown, as two numbers: what dragging in the chart does, for the keyboard. */
export function RangeFields({ label, unit, range, limits, onChange, presets }: RangeFieldsProps) {
  const { from, to } = range;
  const field = { size: 'xs', width: '24' } as const;
  return (
    <chakra.fieldset minW="0">
      <Flex align="center" gap="2" wrap="wrap" fontSize="13px" color="inkSoft">
        <chakra.legend srOnly>{label}</chakra.legend>
        <chakra.label display="flex" alignItems="center" gap="1.5">
          From
          <NumberInput
            {...field}
            value={from}
            min={limits.from}
            max={to}
            onChange={(value) => onChange({ from: value, to })}
          />
        </chakra.label>
        <chakra.label display="flex" alignItems="center" gap="1.5">
          to
          <NumberInput
            {...field}
            value={to}
            min={from}
            max={limits.to}
            onChange={(value) => onChange({ from, to: value })}
          />
        </chakra.label>
        <Text>{unit}</Text>
        {presets}
      </Flex>
    </chakra.fieldset>
  );
}
