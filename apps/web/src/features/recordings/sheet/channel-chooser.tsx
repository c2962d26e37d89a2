import { chakra, Flex, Text } from '@chakra-ui/react';
import { useId, type ReactNode } from 'react';
import { SelectInput } from '../../../components/form-field.js';
import { Segmented } from '../../../components/segmented.js';
import { quantityWords } from '../charts/words.js';
import type { Channel } from '@overtally/contracts';

interface ChannelChooserProps {
  channels: readonly Pick<Channel, 'index' | 'name' | 'quantity' | 'unit'>[];
  value: number;
  onChange: (index: number) => void;
  /** At the left of the row, before the channels. */
  before?: ReactNode;
  /** At the right of the row. */
  actions?: ReactNode;
}

const segmentsAtMost = 4;

/** Row over the figures: the channel they show, and what else belongs to the whole sheet. */
export function ChannelChooser(props: ChannelChooserProps) {
  const { channels, value, onChange, before, actions } = props;
  return (
    <Flex justify="space-between" align="center" wrap="wrap" columnGap="6" rowGap="2" mb="3">
      <Flex align="center" wrap="wrap" columnGap="6" rowGap="2">
        {before}
        <Choice channels={channels} value={value} onChange={onChange} />
      </Flex>
      {actions ? (
        <Flex gap="3" wrap="wrap" align="center">
          {actions}
        </Flex>
      ) : null}
    </Flex>
  );
}

function Choice({ channels, value, onChange }: ChannelChooserProps) {
  const id = useId();
  if (channels.length === 1) {
    const [only] = channels;
    return <Text color="inkSoft">{only ? `${only.name}, ${quantityWords[only.quantity]}` : null}</Text>;
  }
  if (channels.length <= segmentsAtMost) {
    return (
      <Flex align="baseline" gap="2">
        <Text color="inkSoft" fontSize="13px" aria-hidden="true">
          Channel
        </Text>
        <Segmented
          label="Channel"
          value={String(value)}
          options={channels.map(({ index, name }) => ({ value: String(index), label: name }))}
          onChange={(index) => onChange(Number(index))}
        />
      </Flex>
    );
  }
  return (
    <Flex align="center" gap="2">
      <chakra.label htmlFor={id} color="inkSoft" fontSize="13px">
        Channel
      </chakra.label>
      <SelectInput
        id={id}
        width="64"
        options={channels.map(({ index, name, unit }) => ({
          value: String(index),
          label: unit ? `${name} (${unit})` : name,
        }))}
        value={String(value)}
        onChange={(event) => onChange(Number(event.target.value))}
      />
    </Flex>
  );
}
