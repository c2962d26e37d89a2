import { Stack, Text } from '@chakra-ui/react';
import { useCallback } from 'react';
import type { StudyStage } from '@overtally/contracts';
import { circuitKinds } from '@overtally/dsp';
import { numberOf, numberText } from '../../../lib/number-text.js';
import { circuitOf } from '../stages/stage-words.js';
import { numbersText, readNumbers, readRoots, rootsText } from '../stages/value-text.js';
import { TextValues } from './text-values.js';
import { ValueField } from './value-field.js';

export interface SpecFieldsProps<Spec = StudyStage['spec']> {
  spec: Spec;
  /** Name of the stage for screen readers. */
  stage: string;
  disabled: boolean;
  /** Edits the description as it is by then, so that fields need not be drawn anew with it. */
  onEdit: Edit<Spec>;
}

/** `isSliding`: more edits may follow within the frame. */
export type Edit<Spec> = (edit: (spec: Spec) => Spec, isSliding?: boolean) => void;

export type OpenSpec = Exclude<StudyStage['spec'], { kind: 'closed-loop' }>;

type CircuitSpec = Extract<OpenSpec, { kind: 'circuit' }>;

/** Fields of a stage that is no loop; a loop has them for its plant. */
export function OpenFields(props: SpecFieldsProps<OpenSpec>) {
  const { spec } = props;
  return spec.kind === 'circuit' ? (
    <CircuitFields {...props} spec={spec} />
  ) : (
    <RationalFields {...props} spec={spec} />
  );
}

function CircuitFields({ spec, stage, disabled, onEdit }: SpecFieldsProps<OpenSpec> & { spec: CircuitSpec }) {
  const onValue = useCallback(
    (name: string, value: number | undefined, isSliding: boolean) =>
      onEdit((held) => (held.kind === 'circuit' ? withValue(held, name, value) : held), isSliding),
    [onEdit],
  );
  const circuit = circuitOf(spec);
  if (circuit === null) return <Text fontSize="13px">A kind of stage that this page does not know.</Text>;
  return (
    <Stack gap="3">
      {circuitKinds[circuit].parameters.map((parameter) => (
        <ValueField
          key={parameter.name}
          parameter={parameter}
          value={spec.values[parameter.name]}
          stage={stage}
          disabled={disabled}
          onValue={onValue}
        />
      ))}
    </Stack>
  );
}

function withValue(spec: CircuitSpec, name: string, value: number | undefined): CircuitSpec {
  const { [name]: _was, ...others } = spec.values;
  return { ...spec, values: value === undefined ? others : { ...others, [name]: value } };
}

type RationalSpec = Exclude<OpenSpec, { kind: 'circuit' }>;

function RationalFields({ spec, disabled, onEdit }: SpecFieldsProps<OpenSpec> & { spec: RationalSpec }) {
  const onChange = (next: RationalSpec) => onEdit(() => next);
  const numbers = {
    write: numbersText,
    read: (text: string) => {
      const found = readNumbers(text);
      return 'values' in found ? { value: found.values } : found;
    },
  };
  const roots = {
    write: rootsText,
    read: (text: string) => {
      const found = readRoots(text);
      return 'roots' in found ? { value: found.roots } : found;
    },
  };
  return (
    <Stack gap="3">
      {spec.kind === 'coefficients' ? (
        <>
          <TextValues
            {...numbers}
            label="Numerator"
            help="Descending powers of s, parted by spaces"
            value={spec.numerator}
            disabled={disabled}
            onChange={(numerator) => onChange({ ...spec, numerator })}
          />
          <TextValues
            {...numbers}
            label="Denominator"
            value={spec.denominator}
            disabled={disabled}
            onChange={(denominator) => onChange({ ...spec, denominator })}
          />
        </>
      ) : (
        <>
          <TextValues
            {...roots}
            rows={2}
            label="Zeros in 1/s"
            help="One a line: -200, or a pair as -50 ± j 314"
            value={spec.zeros}
            disabled={disabled}
            onChange={(zeros) => onChange({ ...spec, zeros })}
          />
          <TextValues
            {...roots}
            rows={2}
            label="Poles in 1/s"
            value={spec.poles}
            disabled={disabled}
            onChange={(poles) => onChange({ ...spec, poles })}
          />
          <NumberValue
            label="Gain in front of the product"
            value={spec.gain}
            disabled={disabled}
            onChange={(gain) => onChange({ ...spec, gain: gain ?? spec.gain })}
          />
        </>
      )}
      <NumberValue
        isOptional
        label="Delay in s, none if left out"
        value={spec.delayS}
        least={0}
        disabled={disabled}
        onChange={(delayS) => onChange({ ...spec, delayS })}
      />
    </Stack>
  );
}

interface NumberValueProps {
  label: string;
  value: number | undefined;
  /** Smallest value taken; `above`: not itself. */
  least?: number;
  isAbove?: boolean;
  isOptional?: boolean;
  disabled: boolean;
  onChange: (value: number | undefined) => void;
}

/** A plain number as text; one that is optional may be empty. */
export function NumberValue(props: NumberValueProps) {
  const { least = -Infinity, isAbove = false, isOptional = false, ...rest } = props;
  return (
    <TextValues<number | undefined>
      {...rest}
      write={(value) => (value === undefined ? '' : numberText(value, 12))}
      read={(text) => {
        const value = numberOf(text);
        if (value === undefined) return isOptional ? { value } : { problem: 'Give a number, such as 0.7.' };
        if (!Number.isFinite(value)) return { problem: `“${text}” is no number; write it like 0.7.` };
        if (value < least || (isAbove && value === least))
          return { problem: `Must be ${isAbove ? 'above' : 'at least'} ${least}.` };
        return { value };
      }}
    />
  );
}
