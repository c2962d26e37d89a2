import { chakra, Flex, Text } from '@chakra-ui/react';
import { useId } from 'react';
import { SelectInput } from '../../../../components/form-field.js';
import { Segmented } from '../../../../components/segmented.js';
import type { Circuit } from './circuits.js';

interface PowerChooserProps {
  circuits: readonly Circuit[];
  value: string;
  onChange: (key: string) => void;
}

const segmentsAtMost = 4;
const label = (circuit: Circuit) =>
  circuit.kind === 'pair' ? circuit.name : `Three phases, ${circuit.name}`;
const short = (circuit: Circuit) => (circuit.kind === 'pair' ? circuit.name : 'Three phases');

/** The circuit whose power is shown. */
export function PowerChooser({ circuits, value, onChange }: PowerChooserProps) {
  const id = useId();
  const [only] = circuits;
  if (circuits.length === 1) {
    return (
      <Text color="inkSoft" mb="3">
        {only ? label(only) : null}
      </Text>
    );
  }
  const shorts = circuits.map(short);
  if (circuits.length <= segmentsAtMost && new Set(shorts).size === shorts.length) {
    return (
      <Flex mb="3" overflowX="auto">
        <Segmented
          label="Circuit"
          value={value}
          options={circuits.map((circuit) => ({ value: circuit.key, label: short(circuit) }))}
          onChange={onChange}
        />
      </Flex>
    );
  }
  return (
    <Flex align="center" gap="2" mb="3">
      <chakra.label htmlFor={id} color="inkSoft" fontSize="13px">
        Circuit
      </chakra.label>
      <SelectInput
        id={id}
        width="80"
        options={circuits.map((circuit) => ({ value: circuit.key, label: label(circuit) }))}
        value={value}
        onChange={(event) => onChange(event.target.value)}
      />
    </Flex>
  );
}
