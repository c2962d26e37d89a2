import { Button, Flex, Input } from '@chakra-ui/react';
import { quantitySchema, type LimitSet } from '@overtally/contracts';
import { useState, type ReactNode } from 'react';
import { EmptyState } from '../../../components/empty-state.js';
import { FormField, SelectInput } from '../../../components/form-field.js';
import { Section } from '../../../components/section.js';
import { filterLimitSets, type LimitFilter } from '../limit-filter.js';
import { quantityWords } from '../limit-words.js';
import { LimitSetTable } from './limit-set-table.js';

interface LimitSetListProps {
  sets: readonly LimitSet[];
  setTo: (limitSetId: string) => string;
  /** What stands where the project has no set of its own. */
  noneOwn: ReactNode;
}

const all: LimitFilter = { q: '', quantity: null };

/** The project's own sets and the published ones, with search. */
export function LimitSetList({ sets, setTo, noneOwn }: LimitSetListProps) {
  const [filter, setFilter] = useState(all);
  const found = filterLimitSets(sets, filter);
  const own = found.filter((set) => set.projectId !== null);
  const published = found.filter((set) => set.projectId === null);
  const hasOwn = sets.some((set) => set.projectId !== null);
  return (
    <>
      <Filter sets={sets} filter={filter} onChange={setFilter} />
      {found.length === 0 ? (
        <EmptyState
          title="No limit set matches"
          actions={<Button onClick={() => setFilter(all)}>Show all</Button>}
        >
          Standards, titles, editions and sources are searched.
        </EmptyState>
      ) : null}
      {own.length > 0 ? (
        <Section title="Of this project">
          <LimitSetTable label="Limit sets of this project" sets={own} setTo={setTo} />
        </Section>
      ) : null}
      {published.length > 0 ? (
        <Section title="Published" lead="Check the values against the edition that applies to your work.">
          <LimitSetTable label="Published limit sets" sets={published} setTo={setTo} />
        </Section>
      ) : null}
      {hasOwn ? null : noneOwn}
    </>
  );
}

function Filter({
  sets,
  filter,
  onChange,
}: {
  sets: readonly LimitSet[];
  filter: LimitFilter;
  onChange: (filter: LimitFilter) => void;
}) {
  const quantities = quantitySchema.options.filter((quantity) =>
    sets.some((set) => set.quantity === quantity),
  );
  return (
    <Flex gap="3" wrap="wrap" align="flex-end" mb="5">
      <Flex flex="1 1 220px" maxW="420px" minW="0">
        <FormField label="Search">
          <Input
            type="search"
            placeholder="Standard, title, edition, source"
            value={filter.q}
            onChange={(event) => onChange({ ...filter, q: event.target.value })}
          />
        </FormField>
      </Flex>
      <Flex flex="0 1 180px">
        <FormField label="Quantity">
          <SelectInput
            options={[
              { value: '', label: 'Any quantity' },
              ...quantities.map((value) => ({ value, label: quantityWords[value] })),
            ]}
            value={filter.quantity ?? ''}
            onChange={(event) => {
              const quantity = quantitySchema.safeParse(event.target.value);
              onChange({ ...filter, quantity: quantity.success ? quantity.data : null });
            }}
          />
        </FormField>
      </Flex>
    </Flex>
  );
}
