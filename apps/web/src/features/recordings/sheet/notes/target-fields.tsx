import { Flex, Input } from '@chakra-ui/react';
import { FormField, SelectInput } from '../../../../components/form-field.js';
import type { TargetValues } from './target-values.js';

interface TargetFieldsProps {
  values: TargetValues;
  onChange: (values: TargetValues) => void;
  orders: readonly number[];
  problem: string | undefined;
}

const kinds = [
  { value: 'order', label: 'An order' },
  { value: 'line', label: 'A frequency' },
  { value: 'span', label: 'A time span' },
];

/** Choice of what a note speaks of; a click in a figure fills it too. */
export function TargetFields({ values, onChange, orders, problem }: TargetFieldsProps) {
  const set = (change: Partial<TargetValues>) => onChange({ ...values, ...change });
  const number = (label: string, key: 'frequencyHz' | 'fromS' | 'toS', error?: string) => (
    <FormField label={label} error={error}>
      <Input
        size="xs"
        inputMode="decimal"
        fontFamily="mono"
        value={values[key]}
        onChange={(event) => set({ [key]: event.target.value })}
      />
    </FormField>
  );
  return (
    <Flex gap="2" align="flex-start">
      <FormField label="Speaks of">
        <SelectInput
          options={kinds}
          value={values.kind}
          onChange={(event) => set({ kind: event.target.value as TargetValues['kind'] })}
        />
      </FormField>
      {values.kind === 'order' ? (
        <FormField label="Order" error={problem}>
          <SelectInput
            options={[
              { value: '', label: 'Choose' },
              ...orders.map((order) => ({ value: String(order), label: String(order) })),
            ]}
            value={values.order}
            onChange={(event) => set({ order: event.target.value })}
          />
        </FormField>
      ) : null}
      {values.kind === 'line' ? number('Hz', 'frequencyHz', problem) : null}
      {values.kind === 'span' ? (
        <>
          {number('From, s', 'fromS', problem)}
          {number('To, s', 'toS')}
        </>
      ) : null}
    </Flex>
  );
}
