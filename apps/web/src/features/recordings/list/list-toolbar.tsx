import { Flex, Input } from '@chakra-ui/react';
import type { Equipment, LimitSet } from '@overtally/contracts';
import { useEffect, useState } from 'react';
import { FormField, SelectInput } from '../../../components/form-field.js';
import type { RecordingFilter } from '../api/list-recordings.js';
import { statusWords } from '../recording-status.js';

interface ListToolbarProps {
  filter: RecordingFilter;
  limitSets: readonly LimitSet[];
  equipment: readonly Equipment[];
  /** Set the rows are compared with; empty for none. */
  limitSetId: string;
  onChange: (changes: Partial<Record<'q' | 'status' | 'sort' | 'limits' | 'equipment', string>>) => void;
}

const statusOptions = [
  { value: '', label: 'Any state' },
  ...Object.entries(statusWords).map(([value, label]) => ({ value, label })),
];

const sortOptions = [
  { value: '-number', label: 'Newest first' },
  { value: 'number', label: 'Oldest first' },
  { value: 'name', label: 'Name, A to Z' },
  { value: '-name', label: 'Name, Z to A' },
];

/** Search, state, sorting and the limit set the rows are compared with. */
export function ListToolbar({ filter, limitSets, equipment, limitSetId, onChange }: ListToolbarProps) {
  return (
    <Flex gap="3" wrap="wrap" align="flex-end" mb="3">
      <Flex flex="1 1 200px" minW="0">
        <FormField label="Search">
          <SearchInput value={filter.q} onChange={(q) => onChange({ q })} />
        </FormField>
      </Flex>
      <Flex flex="0 1 150px">
        <FormField label="State">
          <SelectInput
            options={statusOptions}
            value={filter.status ?? ''}
            onChange={(event) => onChange({ status: event.target.value })}
          />
        </FormField>
      </Flex>
      {equipment.length > 0 ? (
        <Flex flex="0 1 190px">
          <FormField label="Equipment">
            <SelectInput
              options={[
                { value: '', label: 'Any equipment' },
                ...equipment.map(({ id, name }) => ({ value: id, label: name })),
              ]}
              value={filter.equipmentId ?? ''}
              onChange={(event) => onChange({ equipment: event.target.value })}
            />
          </FormField>
        </Flex>
      ) : null}
      <Flex flex="0 1 150px">
        <FormField label="Sort by">
          <SelectInput
            options={sortOptions}
            value={filter.sort}
            onChange={(event) => onChange({ sort: event.target.value })}
          />
        </FormField>
      </Flex>
      <Flex flex="1 1 260px" maxW={{ md: '360px' }}>
        <FormField label="Compared with">
          <SelectInput
            options={[
              { value: 'none', label: 'No limit set' },
              ...limitSets.map((set) => ({ value: set.id, label: set.title })),
            ]}
            value={limitSetId || 'none'}
            onChange={(event) => onChange({ limits: event.target.value })}
          />
        </FormField>
      </Flex>
    </Flex>
  );
}

/** Waits for a pause in typing, so that not every key asks the server. */
function SearchInput({ value, onChange }: { value: string; onChange: (value: string) => void }) {
  const [text, setText] = useState(value);
  useEffect(() => {
    if (text === value) return;
    const timer = setTimeout(() => onChange(text), 250);
    return () => clearTimeout(timer);
  }, [text, value, onChange]);
  return (
    <Input
      type="search"
      placeholder="Number, name, EUT, file"
      value={text}
      onChange={(event) => setText(event.target.value)}
    />
  );
}
