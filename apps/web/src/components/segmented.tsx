import { chakra, Flex } from '@chakra-ui/react';
import { useId } from 'react';

interface SegmentedProps<T extends string> {
  /** Name of the choice, for screen readers. */
  label: string;
  value: T;
  options: readonly { value: T; label: string }[];
  onChange: (value: T) => void;
}

const Choice = chakra('label', {
  base: {
    position: 'relative',
    cursor: 'pointer',
    color: 'act',
    fontSize: '13px',
    minW: '24px',
    minH: '24px',
    textAlign: 'center',
    px: '1',
    py: '1',
    borderBottomWidth: '2px',
    borderColor: 'transparent',
    _hover: { borderColor: 'ruleStrong' },
    '&:has(:checked)': { color: 'ink', fontWeight: '600', borderColor: 'ink' },
    '&:has(:focus-visible)': { outline: '2px solid', outlineColor: 'act' },
    '& input': { position: 'absolute', inset: '0', opacity: '0', cursor: 'pointer', margin: '0' },
  },
});

/** A choice of few words in a row: Order Frequency, Log Linear. Arrow keys move between them. */
export function Segmented<T extends string>({ label, value, options, onChange }: SegmentedProps<T>) {
  const name = useId();
  return (
    <Flex role="radiogroup" aria-label={label} gap="1" flexShrink="0">
      {options.map((option) => (
        <Choice key={option.value}>
          <input
            type="radio"
            name={name}
            value={option.value}
            checked={option.value === value}
            onChange={() => onChange(option.value)}
          />
          {option.label}
        </Choice>
      ))}
    </Flex>
  );
}
