import { Box, Checkbox, Input, Stack, Text } from '@chakra-ui/react';
import type { ChannelAnalysis, Repeat } from '@overtally/contracts';
import { useState } from 'react';
import { FormField } from '../../../components/form-field.js';
import { formatSi } from '../../../lib/format.js';
import { fittingRepeats, mostRepeats, type RepeatCandidate } from '../repeat-candidates.js';

interface RepeatFieldsProps {
  candidates: readonly RepeatCandidate[];
  /** The channel that is judged. */
  channel: ChannelAnalysis;
  chosen: readonly Repeat[];
  onChange: (repeats: Repeat[]) => void;
}

const searchFrom = 8;

/** Other recordings of the project that may be repeats of the same test; none are needed. */
export function RepeatFields({ candidates, channel, chosen, onChange }: RepeatFieldsProps) {
  const [search, setSearch] = useState('');
  const fitting = fittingRepeats(candidates, channel);
  if (fitting.length === 0) return null;
  const words = search.toLocaleLowerCase().split(/\s+/).filter(Boolean);
  const found = fitting.filter(({ words: of }) => words.every((word) => of.includes(word)));
  const isChosen = ({ analysisId, channel: index }: Repeat) =>
    chosen.some((each) => each.analysisId === analysisId && each.channel === index);
  const toggle = (repeat: Repeat, isOn: boolean) => {
    // One channel of a recording stands for one repeat.
    const others = chosen.filter(({ analysisId }) => analysisId !== repeat.analysisId);
    onChange(isOn ? [...others, repeat] : others);
  };
  return (
    <Box as="fieldset" borderTopWidth="1px" borderColor="rule" pt="3">
      <Text as="legend" fontWeight="600" float="left" w="full">
        Repeats of this test{' '}
        <Text as="span" color="inkSoft" fontWeight="400">
          (optional)
        </Text>
      </Text>
      <Text color="inkSoft" fontSize="13px" mb="2" clear="both">
        Each repeat is judged by itself; the worst result counts, and the spread of the repeats is stated.
      </Text>
      {fitting.length > searchFrom ? (
        <Box maxW="320px" mb="2">
          <FormField label="Search recordings">
            <Input type="search" value={search} onChange={(event) => setSearch(event.target.value)} />
          </FormField>
        </Box>
      ) : null}
      <Stack
        gap="1"
        maxH="180px"
        overflowY="auto"
        tabIndex={0}
        role="group"
        aria-label="Recordings to choose"
      >
        {found.map(({ repeat, recordingNumber, recordingName, channelName, rms, unit }) => (
          <Checkbox.Root
            key={`${repeat.analysisId}:${repeat.channel}`}
            size="sm"
            alignItems="flex-start"
            checked={isChosen(repeat)}
            disabled={!isChosen(repeat) && chosen.length >= mostRepeats}
            onCheckedChange={({ checked }) => toggle(repeat, checked === true)}
          >
            <Checkbox.HiddenInput />
            <Checkbox.Control mt="0.5" />
            <Checkbox.Label fontWeight="400">
              <Text as="span" fontWeight="600">
                {recordingNumber}
              </Text>{' '}
              {recordingName}, {channelName}, {formatSi(rms, unit)} rms
            </Checkbox.Label>
          </Checkbox.Root>
        ))}
        {found.length === 0 ? <Text color="inkSoft">No recording matches.</Text> : null}
      </Stack>
    </Box>
  );
}
