import { Checkbox, Flex, Input } from '@chakra-ui/react';
import { FormField, SelectInput } from '../../../components/form-field.js';
import { standingWords } from '../../../lib/calibration-words.js';
import { instrumentFilterStates, type InstrumentFilter } from '../instrument-filter.js';

interface InstrumentFilterProps {
  filter: InstrumentFilter;
  onChange: (filter: InstrumentFilter) => void;
}

const states = [
  { value: '', label: 'Any calibration' },
  ...instrumentFilterStates.map((value) => ({ value, label: standingWords[value] })),
];

/** Narrows the list of instruments. */
export function InstrumentFilterBar({ filter, onChange }: InstrumentFilterProps) {
  return (
    <Flex gap="3" wrap="wrap" align="flex-end" mb="3">
      <Flex flex="1 1 220px" maxW={{ md: '360px' }}>
        <FormField label="Search">
          <Input
            type="search"
            placeholder="Name, manufacturer, model, number"
            value={filter.q}
            onChange={(event) => onChange({ ...filter, q: event.target.value })}
          />
        </FormField>
      </Flex>
      <Flex flex="0 1 200px">
        <FormField label="Calibration">
          <SelectInput
            options={states}
            value={filter.state}
            onChange={(event) =>
              onChange({ ...filter, state: event.target.value as InstrumentFilter['state'] })
            }
          />
        </FormField>
      </Flex>
      <Checkbox.Root
        size="sm"
        pb="2"
        checked={filter.retired}
        onCheckedChange={({ checked }) => onChange({ ...filter, retired: checked === true })}
      >
        <Checkbox.HiddenInput />
        <Checkbox.Control borderColor="edge" />
        <Checkbox.Label fontWeight="400">Retired ones too</Checkbox.Label>
      </Checkbox.Root>
    </Flex>
  );
}
