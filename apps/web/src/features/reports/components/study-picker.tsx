import { Box, Checkbox, Flex, Stack, Text } from '@chakra-ui/react';
import type { StudyListItem } from '@overtally/contracts';
import { ResultWords } from '../../../components/verdict/result-words.js';
import { formatDateTime } from '../../../lib/format-date.js';

interface StudyPickerProps {
  studies: readonly StudyListItem[];
  /** Chosen versions in the order of the report. */
  value: readonly string[];
  onChange: (studyVersionIds: string[]) => void;
  error?: string | undefined;
}

/**
 * Choice of the studies that a report shows as predictions, in their newest versions. Chosen versions that are not the newest
 * stay chosen until they are taken out.
 */
export function StudyPicker({ studies, value, onChange, error }: StudyPickerProps) {
  const offered = studies.filter(
    ({ retiredAt, versionId }) => retiredAt === null || value.includes(versionId),
  );
  const earlier = value.filter((id) => !studies.some(({ versionId }) => versionId === id));
  if (offered.length === 0 && earlier.length === 0) return null;
  const toggle = (id: string, chosen: boolean) =>
    onChange(chosen ? [...value, id] : value.filter((other) => other !== id));
  return (
    <Stack as="fieldset" gap="2">
      <Text as="legend" fontWeight="600">
        Studies{value.length > 0 ? `, ${value.length} chosen` : ''}
      </Text>
      <Text color="inkSoft" fontSize="13px">
        They stand in the report apart from the verdicts, marked as predictions.
      </Text>
      {error ? (
        <Text color="over" role="alert">
          {error}
        </Text>
      ) : null}
      <Box borderTopWidth="1px" borderColor="ruleStrong">
        {offered.map((study) => (
          <Choice
            key={study.versionId}
            isChosen={value.includes(study.versionId)}
            onChange={(chosen) => toggle(study.versionId, chosen)}
          >
            <Flex columnGap="5" rowGap="1" wrap="wrap" align="center">
              <Box flex="1 1 240px" minW="0">
                <Text>
                  {study.number} {study.name}, version {study.version}
                </Text>
                <Text color="inkSoft" fontSize="13px">
                  {study.author.name}, {formatDateTime(study.savedAt)}
                </Text>
              </Box>
              <Box w="40">
                {study.resultAfter ? (
                  <>
                    Predicted: <ResultWords result={study.resultAfter} />
                  </>
                ) : (
                  <Text color="inkSoft">Not judged</Text>
                )}
              </Box>
            </Flex>
          </Choice>
        ))}
        {earlier.map((id) => (
          <Choice key={id} isChosen onChange={() => toggle(id, false)}>
            An earlier version of a study; take it out to choose the newest
          </Choice>
        ))}
      </Box>
    </Stack>
  );
}

function Choice(props: {
  isChosen: boolean;
  onChange: (chosen: boolean) => void;
  children: React.ReactNode;
}) {
  return (
    <Checkbox.Root
      display="flex"
      alignItems="flex-start"
      gap="3"
      mt="2"
      checked={props.isChosen}
      onCheckedChange={({ checked }) => props.onChange(checked === true)}
    >
      <Checkbox.HiddenInput />
      <Checkbox.Control mt="0.5" />
      <Checkbox.Label fontWeight="400" flex="1" minW="0">
        {props.children}
      </Checkbox.Label>
    </Checkbox.Root>
  );
}
