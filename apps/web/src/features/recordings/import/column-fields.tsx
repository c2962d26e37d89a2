import { Box, Heading, Input, Table, Text } from '@chakra-ui/react';
import { quantitySchema, type ImportPreview } from '@overtally/contracts';
import { useId } from 'react';
import { SelectInput } from '../../../components/form-field.js';
import { quantityWords } from '../quantity-words.js';
import { untouchedColumn, valueColumns, type ColumnDraft, type ImportDraft } from './import-draft.js';

interface ColumnFieldsProps {
  draft: ImportDraft;
  fault: string | undefined;
  preview: ImportPreview;
  onChange: (columns: ImportDraft['columns']) => void;
}

const quantityOptions = quantitySchema.options.map((value) => ({ value, label: quantityWords[value] }));

/** Which columns become channels, and how their values are scaled. */
export function ColumnFields({ draft, fault, preview, onChange }: ColumnFieldsProps) {
  const id = useId();
  const columns = valueColumns(draft, preview);
  if (columns.length === 0) return null;
  return (
    <Box>
      <Heading as="h3" id={id} fontSize="sm" mb="1">
        Channels
      </Heading>
      <Text color="inkSoft" fontSize="13px" mb="1">
        Value = gain × number in the file + offset: a probe ratio, a shunt, an inverted channel (gain −1).
      </Text>
      {fault ? (
        <Text role="alert" color="over" fontSize="13px">
          {fault}
        </Text>
      ) : null}
      <Box role="region" aria-labelledby={id} tabIndex={0} overflow="auto" maxH="280px">
        <Table.Root size="sm">
          <Table.Header>
            <Table.Row>
              {['Read', 'Column', 'Name', 'Quantity', 'Unit', 'Gain', 'Offset'].map((heading) => (
                <Table.ColumnHeader key={heading} scope="col">
                  {heading}
                </Table.ColumnHeader>
              ))}
            </Table.Row>
          </Table.Header>
          <Table.Body>
            {columns.map((column) => (
              <ColumnRow
                key={column.index}
                column={column}
                draft={draft.columns[column.index] ?? untouchedColumn}
                onChange={(change) => onChange({ ...draft.columns, [column.index]: change })}
              />
            ))}
          </Table.Body>
        </Table.Root>
      </Box>
    </Box>
  );
}

interface ColumnRowProps {
  column: ImportPreview['columns'][number];
  draft: ColumnDraft;
  onChange: (draft: ColumnDraft) => void;
}

function ColumnRow({ column, draft, onChange }: ColumnRowProps) {
  const field = (
    key: 'name' | 'unit' | 'gain' | 'offset',
    label: string,
    placeholder: string,
    width: string,
  ) => (
    <Table.Cell>
      <Input
        aria-label={`${label} of column ${column.name}`}
        placeholder={placeholder}
        width={width}
        disabled={!draft.keep}
        value={draft[key]}
        onChange={(event) => onChange({ ...draft, [key]: event.target.value })}
      />
    </Table.Cell>
  );
  return (
    <Table.Row>
      <Table.Cell>
        <input
          type="checkbox"
          aria-label={`Read column ${column.name}`}
          checked={draft.keep}
          onChange={(event) => onChange({ ...draft, keep: event.target.checked })}
        />
      </Table.Cell>
      <Table.Cell whiteSpace="nowrap" color="inkSoft">
        {column.index + 1}
      </Table.Cell>
      {field('name', 'Name', column.name, '130px')}
      <Table.Cell>
        <SelectInput
          aria-label={`Quantity of column ${column.name}`}
          width="140px"
          disabled={!draft.keep}
          options={quantityOptions}
          value={draft.quantity || column.quantity}
          onChange={(event) => onChange({ ...draft, quantity: quantitySchema.parse(event.target.value) })}
        />
      </Table.Cell>
      {field('unit', 'Unit', column.unit, '76px')}
      {field('gain', 'Gain', 'detected', '96px')}
      {field('offset', 'Offset', '0', '96px')}
    </Table.Row>
  );
}
