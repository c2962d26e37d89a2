import { Table, Text } from '@chakra-ui/react';
import { SelectInput } from '../../../components/form-field.js';
import { NumberInput } from '../../../components/number-input.js';
import { valueText } from '../stages/value-text.js';
import { useLateStages, useStudyStore } from '../study-store.js';
import { variableValues, withTolerance, type VariableValue } from '../varying/variable-values.js';

type Distribution = 'uniform' | 'normal';

const distributions = [
  { value: 'uniform', label: 'even' },
  { value: 'normal', label: 'normal, cut off' },
];

/** The tolerance of each value of the stages that are on. */
export function ToleranceFields({ disabled }: { disabled: boolean }) {
  const store = useStudyStore();
  const stages = useLateStages();
  const values = variableValues(stages);
  if (values.length === 0) {
    return <Text fontSize="13px">No stage that is on has a value that could vary.</Text>;
  }
  const set = ({ stage, parameter }: VariableValue, change: Parameters<typeof withTolerance>[2]) =>
    store.change((draft) => ({
      ...draft,
      stages: draft.stages.map((each, i) =>
        i === stage ? withTolerance(each, parameter.name, change) : each,
      ),
    }));
  return (
    <Table.ScrollArea maxH="260px">
      <Table.Root size="sm">
        <Table.Caption srOnly>Tolerances of the values</Table.Caption>
        <Table.Header>
          <Table.Row>
            <Table.ColumnHeader scope="col">Value</Table.ColumnHeader>
            <Table.ColumnHeader scope="col" textAlign="end">
              Nominal
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col">± %</Table.ColumnHeader>
            <Table.ColumnHeader scope="col">Drawn</Table.ColumnHeader>
          </Table.Row>
        </Table.Header>
        <Table.Body>
          {values.map((value) => {
            const { stage, parameter, label } = value;
            const held = stages[stage]!.tolerances.find((each) => each.parameter === parameter.name);
            return (
              <Table.Row key={`${stages[stage]!.key} ${parameter.name}`}>
                <Table.Cell whiteSpace="normal" minW="28">
                  {label}
                </Table.Cell>
                <Table.Cell textAlign="end" fontFamily="mono" whiteSpace="nowrap">
                  {valueText(value.value, parameter.unit)}
                </Table.Cell>
                <Table.Cell>
                  <NumberInput
                    size="xs"
                    width="16"
                    aria-label={`Tolerance of ${label} in percent`}
                    value={held?.tolerancePercent ?? 0}
                    min={0}
                    max={99}
                    disabled={disabled}
                    onChange={(tolerancePercent) => set(value, { tolerancePercent })}
                  />
                </Table.Cell>
                <Table.Cell>
                  <SelectInput
                    aria-label={`Distribution of ${label}`}
                    width="36"
                    options={distributions}
                    value={held?.distribution ?? 'uniform'}
                    disabled={disabled || !held}
                    onChange={(event) => set(value, { distribution: event.target.value as Distribution })}
                  />
                </Table.Cell>
              </Table.Row>
            );
          })}
        </Table.Body>
      </Table.Root>
    </Table.ScrollArea>
  );
}
