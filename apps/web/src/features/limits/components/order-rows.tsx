import { Button, CloseButton, Field, Input, Stack, Table, Text } from '@chakra-ui/react';
import { useFieldArray, useWatch } from 'react-hook-form';
import { Section } from '../../../components/section.js';
import { unitCell } from '@overtally/limits';
import type { LimitSetForm } from '../limit-set-form.js';
import { emptyRow, type LimitRowValues } from '../limit-set-form-values.js';
import { TableFromText } from './table-from-text.js';

const headings: Record<keyof LimitRowValues, string> = {
  orders: 'Orders',
  limit: 'Limit',
  unit: 'Unit',
  cap: 'At most, in A',
};

/** Limits by order: one row for an order or a range of them, or a whole table out of a file. */
export function OrderRows({ form, table }: { form: LimitSetForm; table: number }) {
  const name = `tables.${table}.rows` as const;
  const rows = useFieldArray({ control: form.control, name });
  const errors = form.formState.errors.tables?.[table]?.rows;
  const [basis, unit, referenceParameter, values] = useWatch({
    control: form.control,
    name: ['basis', 'unit', 'referenceParameter', name],
  });
  const hasCaps = basis === 'milliampere-per-watt' || values.some(({ cap }) => cap !== '');
  const fields = (Object.keys(headings) as (keyof LimitRowValues)[]).filter(
    (field) => field !== 'cap' || hasCaps,
  );
  const ownUnit = unitCell({ basis, unit, referenceParameter }) || unit;
  const add = () => {
    const last = Number(form.getValues(name).at(-1)?.orders ?? '1');
    rows.append({ ...emptyRow, orders: Number.isInteger(last) ? String(last + 1) : '' });
  };
  const message = errors?.root?.message ?? errors?.message;
  return (
    <Section
      title="Limits by order"
      lead="A row is for one order (3) or a range (15-39, 15-39 odd). A limit is a number, or arithmetic of the order n such as 0.15*15/n. An empty unit is that of the set."
    >
      <Stack direction={{ base: 'column', xl: 'row' }} gap="8" align="flex-start">
        <Stack gap="2" align="flex-start" w="full" maxW="2xl">
          <Table.ScrollArea w="full" position="relative">
            <Table.Root size="sm" aria-label="Limits by order">
              <Table.Header>
                <Table.Row>
                  {fields.map((field) => (
                    <Table.ColumnHeader key={field} scope="col" px="1">
                      {headings[field]}
                    </Table.ColumnHeader>
                  ))}
                  <Table.ColumnHeader scope="col" w="10">
                    <Text srOnly>Remove</Text>
                  </Table.ColumnHeader>
                </Table.Row>
              </Table.Header>
              <Table.Body>
                {rows.fields.map((row, index) => (
                  <Table.Row key={row.id} verticalAlign="top">
                    {fields.map((field) => (
                      <Table.Cell key={field} px="1">
                        <Field.Root invalid={errors?.[index]?.[field] !== undefined}>
                          <Input
                            aria-label={`${headings[field]}, row ${index + 1}`}
                            autoComplete="off"
                            fontFamily="mono"
                            minW={field === 'limit' || field === 'orders' ? '28' : '20'}
                            placeholder={field === 'unit' ? ownUnit : undefined}
                            {...form.register(`${name}.${index}.${field}`)}
                          />
                          <Field.ErrorText role="alert">{errors?.[index]?.[field]?.message}</Field.ErrorText>
                        </Field.Root>
                      </Table.Cell>
                    ))}
                    <Table.Cell px="1">
                      <CloseButton
                        size="xs"
                        variant="ghost"
                        aria-label={`Remove row ${index + 1}`}
                        onClick={() => rows.remove(index)}
                      />
                    </Table.Cell>
                  </Table.Row>
                ))}
              </Table.Body>
            </Table.Root>
          </Table.ScrollArea>
          {message ? (
            <Text color="over" role="alert">
              {message}
            </Text>
          ) : null}
          <Button size="xs" onClick={add}>
            Add a row
          </Button>
        </Stack>
        <TableFromText
          onTable={({ rows: read, totals }, reading) => {
            rows.replace(read);
            form.setValue(`tables.${table}.totals`, totals);
            if (reading === null) return;
            form.setValue('basis', reading.basis);
            if (reading.basis === 'absolute') form.setValue('unit', reading.unit);
            if (reading.referenceParameter) form.setValue('referenceParameter', reading.referenceParameter);
          }}
        />
      </Stack>
    </Section>
  );
}
