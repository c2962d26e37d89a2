import { Box, Checkbox, Flex, Input, Stack, Text, VisuallyHidden } from '@chakra-ui/react';
import type { Verdict } from '@overtally/contracts';
import { useState } from 'react';
import { TallyStrip } from '../../../components/tally-strip.js';
import { ResultWords } from '../../../components/verdict/result-words.js';
import { formatDateTime } from '../../../lib/format-date.js';
import { limitSetName } from '../../../lib/limit-set-name.js';
import { groupVerdicts, type RecordingName } from '../verdict-groups.js';

interface VerdictPickerProps {
  verdicts: readonly Verdict[];
  recordings: readonly RecordingName[];
  /** Chosen verdicts in the order of the report. */
  value: readonly string[];
  onChange: (verdictIds: string[]) => void;
  error?: string | undefined;
}

/** Choice of the verdicts that a report is made of, by recording; the report keeps the order of choosing. */
export function VerdictPicker({ verdicts, recordings, value, onChange, error }: VerdictPickerProps) {
  const [search, setSearch] = useState('');
  const groups = groupVerdicts(verdicts, recordings, search);
  const toggle = (id: string, chosen: boolean) =>
    onChange(chosen ? [...value, id] : value.filter((other) => other !== id));
  return (
    <Stack as="fieldset" gap="2">
      <Flex justify="space-between" align="center" gap="3" wrap="wrap">
        <Text as="legend" fontWeight="600">
          Verdicts{value.length > 0 ? `, ${value.length} chosen` : ''}
        </Text>
        <Input
          type="search"
          aria-label="Search verdicts"
          placeholder="Recording, limit set, result"
          w={{ base: 'full', sm: '64' }}
          value={search}
          onChange={(event) => setSearch(event.target.value)}
        />
      </Flex>
      {error ? (
        <Text color="over" role="alert">
          {error}
        </Text>
      ) : null}
      <Box borderTopWidth="1px" borderColor="ruleStrong">
        {groups.map(({ recording, verdicts: own }) => (
          <Box key={recording.id} py="3" borderBottomWidth="1px" borderColor="rule">
            <Text>
              <Box as="span" fontWeight="600" mr="2">
                {recording.number}
              </Box>
              {recording.name}
              {recording.eut ? (
                <Box as="span" color="inkSoft">
                  , {recording.eut}
                </Box>
              ) : null}
            </Text>
            {own.map((verdict) => (
              <VerdictChoice
                key={verdict.id}
                verdict={verdict}
                place={value.indexOf(verdict.id) + 1}
                label={`${recording.number} ${verdict.channelName}, ${limitSetName(verdict.limitSet)}`}
                onChange={(chosen) => toggle(verdict.id, chosen)}
              />
            ))}
          </Box>
        ))}
        {groups.length === 0 ? (
          <Text color="inkSoft" py="3">
            No verdict matches.
          </Text>
        ) : null}
      </Box>
    </Stack>
  );
}

function VerdictChoice(props: {
  verdict: Verdict;
  /** Place in the report from 1; 0 when not chosen. */
  place: number;
  label: string;
  onChange: (chosen: boolean) => void;
}) {
  const { verdict, place } = props;
  return (
    <Checkbox.Root
      display="flex"
      alignItems="flex-start"
      gap="3"
      mt="2"
      checked={place > 0}
      onCheckedChange={({ checked }) => props.onChange(checked === true)}
    >
      <Checkbox.HiddenInput />
      <Checkbox.Control mt="0.5" />
      <Checkbox.Label fontWeight="400" flex="1" minW="0">
        <VisuallyHidden>{props.label}. </VisuallyHidden>
        <Flex columnGap="5" rowGap="1" wrap="wrap" align="center">
          <Box flex="1 1 240px" minW="0">
            <Text>
              {verdict.channelName} against {limitSetName(verdict.limitSet)}
            </Text>
            <Text color="inkSoft" fontSize="13px">
              {verdict.author.name}, {formatDateTime(verdict.createdAt)}
            </Text>
          </Box>
          <Box hideBelow="sm">
            <TallyStrip shares={verdict.orders} />
          </Box>
          <Box w="32">
            <ResultWords result={verdict.result} />
            {place > 0 ? (
              <Text color="inkSoft" fontSize="xs">
                Section {place}
              </Text>
            ) : null}
          </Box>
        </Flex>
      </Checkbox.Label>
    </Checkbox.Root>
  );
}
