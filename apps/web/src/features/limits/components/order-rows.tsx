import { Button, CloseButton, Field, Input, Stack, Table, Text, Textarea } from '@chakra-ui/react';
import { useState } from 'react';
import { useFieldArray } from 'react-hook-form';
import { FormField } from '../../../components/form-field.js';
import { Section } from '../../../components/section.js';
import type { LimitSetForm } from '../limit-set-form.js';
import { parsePastedLimits, pasteWords } from '../paste-limits.js';

/** Limits by order: one row each, or many at once from a spreadsheet. */
export function OrderRows({ form, unit }: { form: LimitSetForm; unit: string }) {
  const rows = useFieldArray({ control: form.control, name: 'orders' });
  const { errors } = form.formState;
  const add = () => {
    const last = Number(form.getValues('orders').at(-1)?.order ?? '1');
    rows.append({ order: Number.isInteger(last) ? String(last + 1) : '', limit: '' });
  };
  return (
    <Section title="Limits by order">
      <Stack direction={{ base: 'column', lg: 'row' }} gap="8" align="flex-start">
        <Stack gap="2" align="flex-start" w="full" maxW="sm">
          <Table.Root size="sm" aria-label="Limits by order">
            <Table.Header>
              <Table.Row>
                <Table.ColumnHeader scope="col" w="24">
                  Order
                </Table.ColumnHeader>
                <Table.ColumnHeader scope="col">{unit ? `Limit in ${unit}` : 'Limit'}</Table.ColumnHeader>
                <Table.ColumnHeader scope="col" w="10">
                  <Text srOnly>Remove</Text>
                </Table.ColumnHeader>
              </Table.Row>
            </Table.Header>
            <Table.Body>
              {rows.fields.map((field, index) => (
                <OrderRow key={field.id} form={form} index={index} onRemove={() => rows.remove(index)} />
              ))}
            </Table.Body>
          </Table.Root>
          {(errors.orders?.root?.message ?? errors.orders?.message) ? (
            <Text color="over" role="alert">
              {errors.orders?.root?.message ?? errors.orders?.message}
            </Text>
          ) : null}
          <Button size="xs" onClick={add}>
            Add an order
          </Button>
        </Stack>
        <PasteRows onRows={(pasted) => rows.replace(pasted)} />
      </Stack>
    </Section>
  );
}

function OrderRow({ form, index, onRemove }: { form: LimitSetForm; index: number; onRemove: () => void }) {
  const errors = form.formState.errors.orders?.[index];
  return (
    <Table.Row verticalAlign="top">
      <Table.Cell px="1">
        <Field.Root invalid={errors?.order !== undefined}>
          <Input
            aria-label={`Order, row ${index + 1}`}
            inputMode="numeric"
            fontFamily="mono"
            {...form.register(`orders.${index}.order`)}
          />
          <Field.ErrorText role="alert">{errors?.order?.message}</Field.ErrorText>
        </Field.Root>
      </Table.Cell>
      <Table.Cell px="1">
        <Field.Root invalid={errors?.limit !== undefined}>
          <Input
            aria-label={`Limit, row ${index + 1}`}
            inputMode="decimal"
            fontFamily="mono"
            {...form.register(`orders.${index}.limit`)}
          />
          <Field.ErrorText role="alert">{errors?.limit?.message}</Field.ErrorText>
        </Field.Root>
      </Table.Cell>
      <Table.Cell px="1">
        <CloseButton size="xs" variant="ghost" aria-label={`Remove row ${index + 1}`} onClick={onRemove} />
      </Table.Cell>
    </Table.Row>
  );
}

function PasteRows({ onRows }: { onRows: (rows: { order: string; limit: string }[]) => void }) {
  const [text, setText] = useState('');
  const pasted = parsePastedLimits(text);
  const { rows, problems } = pasted;
  return (
    <Stack gap="2" align="flex-start" w="full" maxW="sm">
      <FormField
        label="From a spreadsheet"
        help="Copy two columns, order and limit, and paste them here. A range such as 15-39 gives its limit to each order."
      >
        <Textarea
          rows={6}
          fontFamily="mono"
          placeholder={'3\t2.3\n5\t1.14'}
          value={text}
          onChange={(event) => setText(event.target.value)}
        />
      </FormField>
      {problems.slice(0, 3).map((problem) => (
        <Text key={problem.line} color="over" fontSize="13px" role="alert">
          Line {problem.line}: {problem.message}
        </Text>
      ))}
      {problems.length > 3 ? <Text fontSize="13px">and {problems.length - 3} more lines</Text> : null}
      <Button
        size="xs"
        disabled={rows.length === 0}
        onClick={() => {
          onRows(rows);
          setText('');
        }}
      >
        {pasteWords(pasted)}
      </Button>
    </Stack>
  );
}
