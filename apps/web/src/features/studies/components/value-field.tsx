import { Box, chakra, Field, Flex, Input } from '@chakra-ui/react';
import type { CircuitParameter } from '@overtally/dsp';
import { memo, useState } from 'react';
import { isWithin, positionOf, scaleAbout, valueAt, type SliderScale } from '../stages/slider-scale.js';
import { readValue, valueText } from '../stages/value-text.js';

interface ValueFieldProps {
  parameter: CircuitParameter;
  /** Undefined where an optional value is left out. */
  value: number | undefined;
  /** Name of the stage, to tell equal values apart for screen readers. */
  stage: string;
  disabled: boolean;
  onValue: (name: string, value: number | undefined, isSliding: boolean) => void;
}

/** One value of a stage: typed with prefix and unit, or moved by a slider over a stated range. */
export const ValueField = memo(function ValueField(props: ValueFieldProps) {
  const { parameter, value, stage, disabled, onValue } = props;
  const { name, symbol, meaning, unit, range, default: fallback } = parameter;
  const [draft, setDraft] = useState<string | null>(null);
  const shown = value ?? fallback ?? undefined;
  const written = value === undefined ? '' : valueText(value, unit);
  const read = draft === null ? null : readValue(draft, parameter);
  const commit = () => {
    if (read === null || read.problem !== null) return;
    if (read.value !== value) onValue(name, read.value, false);
    setDraft(null);
  };
  return (
    <Field.Root invalid={read !== null && read.problem !== null} disabled={disabled} gap="0">
      <Flex w="full" align="baseline" gap="2" justify="space-between">
        <Field.Label fontSize="13px" fontWeight="400" gap="1.5" minW="0">
          <chakra.span fontWeight="600" fontFamily="mono">
            {symbol}
          </chakra.span>
          <chakra.span color="inkSoft" overflowWrap="anywhere">
            {meaning}
          </chakra.span>
        </Field.Label>
        <Input
          size="xs"
          w="24"
          flexShrink="0"
          textAlign="end"
          fontFamily="mono"
          autoComplete="off"
          placeholder={fallback === null ? 'none' : fallback === undefined ? '' : valueText(fallback, unit)}
          aria-label={`${symbol}, ${meaning}, of ${stage}`}
          value={draft ?? written}
          onChange={(event) => setDraft(event.target.value)}
          onBlur={commit}
          onKeyDown={(event) => {
            if (event.key === 'Enter') commit();
            if (event.key === 'Escape') setDraft(null);
          }}
        />
      </Flex>
      {shown === undefined ? null : (
        <ValueSlider
          label={`${symbol} of ${stage}, slider`}
          value={shown}
          unit={unit}
          isPositive={range !== 'any'}
          disabled={disabled}
          onSlide={(next) => {
            setDraft(null);
            onValue(name, next, true);
          }}
        />
      )}
      <Field.ErrorText role="alert">{read?.problem}</Field.ErrorText>
    </Field.Root>
  );
});

interface ValueSliderProps {
  label: string;
  value: number;
  unit: string;
  isPositive: boolean;
  disabled: boolean;
  onSlide: (value: number) => void;
}

function ValueSlider({ label, value, unit, isPositive, disabled, onSlide }: ValueSliderProps) {
  const [scale, setScale] = useState<SliderScale>(() => scaleAbout(value, isPositive));
  // A value that was typed beyond the range takes the range along.
  if (!isWithin(value, scale)) setScale(scaleAbout(value, isPositive));
  return (
    <Box w="full">
      <chakra.input
        type="range"
        display="block"
        w="full"
        h="24px"
        m="0"
        accentColor="var(--chakra-colors-act)"
        cursor={disabled ? 'default' : 'pointer'}
        disabled={disabled}
        aria-label={label}
        aria-valuetext={valueText(value, unit)}
        min={0}
        max={scale.steps}
        step={1}
        value={positionOf(value, scale)}
        onChange={(event) => onSlide(valueAt(Number(event.target.value), scale))}
      />
      <Flex justify="space-between" fontSize="xs" color="inkSoft" lineHeight="1" aria-hidden="true">
        <span>{valueText(scale.from, unit)}</span>
        <span>{valueText(scale.to, unit)}</span>
      </Flex>
    </Box>
  );
}
