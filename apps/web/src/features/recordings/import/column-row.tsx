import { Box, Button, Flex, Input, Table, Text } from '@chakra-ui/react';
import { quantitySchema, type ImportPreview, type Quantity } from '@overtally/contracts';
import { useId } from 'react';
import { SelectInput } from '../../../components/form-field.js';
import { quantityWords } from '../quantity-words.js';
import { untouchedColumn, type ColumnDraft, type ColumnFaults } from './column-draft.js';

type Column = ImportPreview['columns'][number];

const quantityOptions = quantitySchema.options.map((value) => ({ value, label: quantityWords[value] }));

/** The column that tells the time: it stands in its place and is no channel. */
export function TimeRow({ column, span }: { column: Column; span: number }) {
  return (
    <Table.Row>
      <Table.Cell px="1.5" data-whole>
        <Flex as="span" align="center" gap="2" color="inkSoft">
          <input type="checkbox" disabled aria-label={`Column ${column.name} tells the time`} />
          {column.index + 1}
          <Box as="span" hideFrom="md">
            {column.name}, tells the time
          </Box>
        </Flex>
      </Table.Cell>
      <Table.Cell px="1.5" color="inkSoft" colSpan={span} hideBelow="md">
        {column.name}, tells the time
      </Table.Cell>
      <Table.Cell hideBelow="md" />
    </Table.Row>
  );
}

interface ColumnRowProps {
  column: Column;
  /** True for a second column that tells the time. */
  isClock: boolean;
  hasFullScale: boolean;
  fields: ColumnDraft;
  faults: ColumnFaults;
  /** Quantity that is taken while none is chosen. */
  quantity: Quantity;
  /** Other channels that can be scaled like this one. */
  alike: number;
  unit: string;
  onChange: (fields: ColumnDraft) => void;
  onApplyToAlike: () => void;
}

/** One column: whether it is read, as what, and how its numbers are scaled. */
export function ColumnRow(props: ColumnRowProps) {
  const { column, isClock, hasFullScale, fields, faults, quantity, alike, unit, onChange } = props;
  const set = (part: Partial<ColumnDraft>) => onChange({ ...fields, ...part });
  const field = (key: TextKey, caption: string, placeholder: string, width: string) => (
    <TextCell
      caption={caption}
      label={`${caption} of column ${column.name}`}
      placeholder={placeholder}
      width={width}
      disabled={!fields.keep}
      value={fields[key]}
      fault={key === 'name' || key === 'unit' ? undefined : faults[key]}
      onChange={(text) => set({ [key]: text })}
    />
  );
  return (
    <Table.Row
      verticalAlign="top"
      color={fields.keep ? undefined : 'inkSoft'}
      data-unread={fields.keep ? undefined : true}
    >
      <Table.Cell px="1.5" data-whole>
        <Flex as="label" align="center" gap="2" minH="32px" whiteSpace="nowrap">
          <input
            type="checkbox"
            aria-label={`Read column ${column.name}`}
            checked={fields.keep}
            onChange={(event) => set({ keep: event.target.checked })}
          />
          <Box as="span" color="inkSoft">
            {column.index + 1}
            {isClock ? ' · time' : ''}
          </Box>
          <Box as="span" hideFrom="md">
            {column.name}
          </Box>
        </Flex>
      </Table.Cell>
      {field('name', 'Name', column.name, '120px')}
      <Table.Cell px="1.5" data-caption="Quantity">
        <SelectInput
          aria-label={`Quantity of column ${column.name}`}
          width={{ base: 'full', md: '136px' }}
          disabled={!fields.keep}
          options={quantityOptions}
          value={fields.quantity || quantity}
          onChange={(event) => set({ quantity: quantitySchema.parse(event.target.value) })}
        />
      </Table.Cell>
      {field('unit', 'Unit', column.unit, '68px')}
      {field('probeRatio', 'Probe ratio', '1 : 1', '84px')}
      {hasFullScale ? field('fullScale', 'Input at full scale', unit ? `1 ${unit}` : '1', '96px') : null}
      {field('gain', 'Gain', 'detected', '92px')}
      {field('offset', 'Offset', '0', '76px')}
      <Table.Cell px="1.5" data-caption="Inverted">
        <Flex align="center" minH="32px">
          <input
            type="checkbox"
            aria-label={`Inverted: column ${column.name}`}
            disabled={!fields.keep}
            checked={fields.inverted}
            onChange={(event) => set({ inverted: event.target.checked })}
          />
        </Flex>
      </Table.Cell>
      <Table.Cell px="1.5" data-whole>
        {fields.keep && alike > 0 && isScaled(fields) ? (
          <Button
            size="xs"
            variant="ghost"
            colorPalette="act"
            mt={{ md: '1' }}
            aria-label={`Scale ${othersWords(alike, unit)} like column ${column.name}`}
            onClick={props.onApplyToAlike}
          >
            Same for {othersWords(alike, unit)}
          </Button>
        ) : null}
      </Table.Cell>
    </Table.Row>
  );
}

type TextKey = 'name' | 'unit' | 'probeRatio' | 'fullScale' | 'gain' | 'offset';

/** "the other 3 in V" */
function othersWords(count: number, unit: string): string {
  const others = count === 1 ? 'the other one' : `the other ${count}`;
  return unit ? `${others} in ${unit}` : others;
}

/** True once anything is set that another channel could take over. */
const isScaled = (fields: ColumnDraft) =>
  (['quantity', 'unit', 'probeRatio', 'fullScale', 'gain', 'offset', 'inverted'] as const).some(
    (key) => fields[key] !== untouchedColumn[key],
  );

interface TextCellProps {
  caption: string;
  label: string;
  placeholder: string;
  width: string;
  disabled: boolean;
  value: string;
  fault: string | undefined;
  onChange: (text: string) => void;
}

function TextCell({ caption, label, width, fault, onChange, ...input }: TextCellProps) {
  const id = useId();
  return (
    <Table.Cell px="1.5" data-caption={caption}>
      <Input
        {...input}
        aria-label={label}
        aria-invalid={fault === undefined ? undefined : true}
        aria-describedby={fault === undefined ? undefined : id}
        width={{ base: 'full', md: width }}
        borderColor={fault === undefined ? undefined : 'over'}
        onChange={(event) => onChange(event.target.value)}
      />
      {fault === undefined ? null : (
        <Text id={id} role="alert" color="over" fontSize="xs" maxW={width} whiteSpace="normal" mt="0.5">
          {fault}
        </Text>
      )}
    </Table.Cell>
  );
}
