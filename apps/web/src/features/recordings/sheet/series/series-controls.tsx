import { chakra, Flex } from '@chakra-ui/react';
import { aggregationSchema, type ChannelAnalysis } from '@overtally/contracts';
import { useId } from 'react';
import { SelectInput } from '../../../../components/form-field.js';
import { Segmented } from '../../../../components/segmented.js';
import {
  figureOptions,
  fitted,
  orderLabel,
  orderOptions,
  type FollowedFigure,
  type SeriesChoice,
} from './series-choice.js';

interface SeriesControlsProps {
  channel: ChannelAnalysis;
  choice: SeriesChoice;
  onChoice: (choice: SeriesChoice) => void;
}

/** What is followed, of which order, and over which intervals. */
export function SeriesControls({ channel, choice, onChoice }: SeriesControlsProps) {
  const orders = orderOptions(choice.figure, channel);
  return (
    <Flex align="center" wrap="wrap" columnGap="4" rowGap="2" mb="2">
      <Choice
        label="Figure"
        width="64"
        options={figureOptions(channel)}
        value={choice.figure}
        onChange={(figure) => onChoice(fitted({ ...choice, figure: figure as FollowedFigure }, channel))}
      />
      {orders.length > 0 ? (
        <Choice
          label={orderLabel(choice.figure)}
          width={choice.figure === 'band' ? '40' : '32'}
          options={orders.map(({ value, label }) => ({ value: String(value), label }))}
          value={String(choice.order)}
          onChange={(order) => onChoice({ ...choice, order: Number(order) })}
        />
      ) : null}
      {choice.figure === 'counted' ? null : (
        <Segmented
          label="Interval"
          value={choice.aggregation}
          options={aggregationSchema.options.map((value) => ({ value, label: intervalWords[value] }))}
          onChange={(aggregation) => onChoice({ ...choice, aggregation })}
        />
      )}
    </Flex>
  );
}

const intervalWords = { window: 'Each window', '3s': '3 s', '10min': '10 min' } as const;

function Choice(props: {
  label: string;
  width: string;
  options: readonly { value: string; label: string }[];
  value: string;
  onChange: (value: string) => void;
}) {
  const id = useId();
  return (
    <Flex align="center" gap="2">
      <chakra.label htmlFor={id} color="inkSoft" fontSize="13px">
        {props.label}
      </chakra.label>
      <SelectInput
        id={id}
        width={props.width}
        options={props.options}
        value={props.value}
        onChange={(event) => props.onChange(event.target.value)}
      />
    </Flex>
  );
}
