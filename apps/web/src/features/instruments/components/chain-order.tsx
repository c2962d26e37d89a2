import { Box, Button, Flex, Heading, Stack, Text } from '@chakra-ui/react';
import type { Instrument } from '@overtally/contracts';
import { useState, type KeyboardEvent } from 'react';
import { FormField, SelectInput } from '../../../components/form-field.js';
import { moved } from '../chain-order.js';
import { identityWords } from '../instrument-words.js';

interface ChainOrderProps {
  instruments: readonly Instrument[];
  chosen: readonly string[];
  onChange: (ids: string[]) => void;
  /** Recordings were made through it, so that its instruments stay. */
  isFixed: boolean;
  error: string | undefined;
}

/** Instruments in their order from the quantity to the samples; arrow keys with Alt move one. */
export function ChainOrder({ instruments, chosen, onChange, isFixed, error }: ChainOrderProps) {
  const [said, setSaid] = useState('');
  const nameOf = (id: string) => instruments.find((each) => each.id === id)?.name ?? 'Unknown instrument';
  const move = (at: number, by: -1 | 1) => {
    const to = at + by;
    if (to < 0 || to >= chosen.length) return;
    const id = chosen[at]!;
    onChange(moved(chosen, at, to));
    setSaid(`${nameOf(id)} is number ${to + 1} of ${chosen.length}`);
  };
  const onKey = (event: KeyboardEvent, at: number) => {
    if (isFixed || !event.altKey || (event.key !== 'ArrowUp' && event.key !== 'ArrowDown')) return;
    event.preventDefault();
    move(at, event.key === 'ArrowUp' ? -1 : 1);
  };
  const offered = instruments.filter(({ id, retiredAt }) => retiredAt === null && !chosen.includes(id));
  return (
    <Stack as="fieldset" gap="2">
      <Heading as="legend" fontSize="sm">
        Instruments, from the quantity to the samples
      </Heading>
      {isFixed ? (
        <Text color="inkSoft" fontSize="13px">
          Recordings were made through this chain, so its instruments stay. Copy it to change them.
        </Text>
      ) : null}
      <Stack
        as="ol"
        gap="0"
        listStyleType="none"
        borderTopWidth={chosen.length > 0 ? '1px' : '0'}
        borderColor="rule"
      >
        {chosen.map((id, at) => {
          const instrument = instruments.find((each) => each.id === id);
          return (
            <Flex
              as="li"
              key={id}
              align="center"
              gap="3"
              py="1.5"
              borderBottomWidth="1px"
              borderColor="rule"
              onKeyDown={(event) => onKey(event, at)}
            >
              <Text fontFamily="mono" color="inkSoft">
                {at + 1}
              </Text>
              <Box flex="1" minW="0">
                <Text fontWeight="600" overflowWrap="anywhere">
                  {nameOf(id)}
                </Text>
                <Text color="inkSoft" fontSize="13px" overflowWrap="anywhere">
                  {instrument ? identityWords(instrument) : ''}
                </Text>
              </Box>
              {isFixed ? null : (
                <Flex gap="1">
                  <Button
                    size="xs"
                    aria-label={`Move ${nameOf(id)} up`}
                    disabled={at === 0}
                    onClick={() => move(at, -1)}
                  >
                    Up
                  </Button>
                  <Button
                    size="xs"
                    aria-label={`Move ${nameOf(id)} down`}
                    disabled={at === chosen.length - 1}
                    onClick={() => move(at, 1)}
                  >
                    Down
                  </Button>
                  <Button
                    size="xs"
                    aria-label={`Take out ${nameOf(id)}`}
                    onClick={() => {
                      onChange(chosen.filter((each) => each !== id));
                      setSaid(`${nameOf(id)} taken out`);
                    }}
                  >
                    Take out
                  </Button>
                </Flex>
              )}
            </Flex>
          );
        })}
      </Stack>
      {isFixed ? null : (
        <FormField
          label="Add an instrument"
          help="It is put at the end. Alt with an arrow key moves the one whose buttons have the focus."
          error={error}
        >
          <SelectInput
            value=""
            options={[
              { value: '', label: offered.length > 0 ? 'Choose' : 'No other instrument is in use' },
              ...offered.map((each) => ({ value: each.id, label: `${each.name}, ${identityWords(each)}` })),
            ]}
            onChange={(event) => {
              if (!event.target.value) return;
              onChange([...chosen, event.target.value]);
              setSaid(`${nameOf(event.target.value)} added as number ${chosen.length + 1}`);
            }}
          />
        </FormField>
      )}
      <Box srOnly role="status">
        {said}
      </Box>
    </Stack>
  );
}
