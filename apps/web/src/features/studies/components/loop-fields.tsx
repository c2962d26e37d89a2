import { Box, Button, Flex, Stack, Text } from '@chakra-ui/react';
import type { StudyStage } from '@overtally/contracts';
import { FormField, SelectInput } from '../../../components/form-field.js';
import {
  kindWords,
  loopWords,
  startingSpec,
  type LoopOutput,
  type StageKind,
} from '../stages/stage-words.js';
import { KindSelect } from './kind-select.js';
import { NumberValue, OpenFields, type Edit, type OpenSpec, type SpecFieldsProps } from './open-fields.js';

export type LoopSpec = Extract<StudyStage['spec'], { kind: 'closed-loop' }>;

const outputs = (Object.keys(loopWords) as LoopOutput[]).map((value) => ({ value, label: loopWords[value] }));

/** Controller and plant of a loop with unity negative feedback. */
export function LoopFields(props: SpecFieldsProps<LoopSpec>) {
  const { spec, stage, disabled, onEdit } = props;
  const onChange = (next: LoopSpec) => onEdit(() => next);
  const { controller, plant } = spec;
  const onPlant =
    (index: number): Edit<OpenSpec> =>
    (edit, isSliding) =>
      onEdit(
        (held) => ({ ...held, plant: held.plant.map((each, i) => (i === index ? edit(each) : each)) }),
        isSliding,
      );
  const time = { least: 0, isAbove: true, isOptional: true, disabled };
  return (
    <Stack gap="3">
      <FormField label="Answer that is meant">
        <SelectInput
          options={outputs}
          value={spec.output}
          disabled={disabled}
          onChange={(event) => onChange({ ...spec, output: event.target.value as LoopOutput })}
        />
      </FormField>
      <Text fontSize="13px" fontWeight="600">
        Controller Kp (1 + 1/(s Ti) + s Td/(1 + s Td/N))
      </Text>
      <Box display="grid" gridTemplateColumns="1fr 1fr" gap="3">
        <NumberValue
          label="Kp"
          value={controller.gain}
          disabled={disabled}
          onChange={(gain) => onChange({ ...spec, controller: { ...controller, gain: gain ?? 1 } })}
        />
        <NumberValue
          {...time}
          label="Ti in s"
          value={controller.integralTimeS}
          onChange={(integralTimeS) => onChange({ ...spec, controller: { ...controller, integralTimeS } })}
        />
        <NumberValue
          {...time}
          label="Td in s"
          value={controller.derivativeTimeS}
          onChange={(derivativeTimeS) =>
            onChange({ ...spec, controller: { ...controller, derivativeTimeS } })
          }
        />
        <NumberValue
          {...time}
          label="N"
          value={controller.derivativeFilter}
          onChange={(derivativeFilter) =>
            onChange({ ...spec, controller: { ...controller, derivativeFilter } })
          }
        />
      </Box>
      {plant.map((part, index) => (
        <Stack key={index} gap="2" borderLeftWidth="2px" borderColor="ruleStrong" pl="3">
          <Flex justify="space-between" align="center">
            <Text fontSize="13px" fontWeight="600">{`Plant ${index + 1}: ${kindWords(part)}`}</Text>
            {plant.length > 1 && !disabled ? (
              <Button
                size="xs"
                variant="ghost"
                onClick={() => onChange({ ...spec, plant: plant.filter((_, i) => i !== index) })}
              >
                Remove
              </Button>
            ) : null}
          </Flex>
          <OpenFields
            spec={part}
            stage={`plant ${index + 1} of ${stage}`}
            disabled={disabled}
            onEdit={onPlant(index)}
          />
        </Stack>
      ))}
      {plant.length < 8 && !disabled ? (
        <KindSelect
          label={`Add to the plant of ${stage}`}
          word="Add to the plant"
          without="closed-loop"
          onChoose={(kind: StageKind) =>
            onChange({ ...spec, plant: [...plant, startingSpec(kind) as OpenSpec] })
          }
        />
      ) : null}
      <NumberValue
        isOptional
        label="Padé order for delays in the plant, 1 to 10"
        value={spec.padeOrder}
        least={1}
        disabled={disabled}
        onChange={(order) =>
          onChange({
            ...spec,
            padeOrder: order === undefined ? undefined : Math.min(10, Math.round(order)),
          })
        }
      />
    </Stack>
  );
}
