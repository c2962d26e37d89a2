import { Box, chakra, Text } from '@chakra-ui/react';
import type { Recording } from '@overtally/contracts';
import type { ReactNode } from 'react';
import { Section } from '../../../components/section.js';
import { optionsWords } from '../rules/options-words.js';
import { OptionList } from '../rules/rule-table.js';

/** By which rule and settings the source was read. */
export function ReadingSection({ recording }: { recording: Recording }) {
  const { readingRule, file } = recording;
  return (
    <Section title="Reading" lead="How the samples came out of the source, which stays as it is." mt="8">
      <chakra.dl
        display="grid"
        gridTemplateColumns={{ base: '1fr', sm: 'max-content minmax(0, 1fr)' }}
        columnGap="6"
        rowGap={{ base: '0', sm: '2' }}
      >
        <Entry caption="Source">
          <Box as="span" overflowWrap="anywhere">
            {[file.name, recording.format?.toUpperCase()].filter(Boolean).join(', ')}
          </Box>
        </Entry>
        <Entry caption="Reading rule">
          {readingRule ? (
            <>
              {readingRule.name}
              {readingRule.id === null ? (
                <Box as="span" color="inkSoft">
                  {' '}
                  (deleted since)
                </Box>
              ) : null}
            </>
          ) : (
            <Text color="inkSoft">none</Text>
          )}
        </Entry>
        <Entry caption="Settings">
          <OptionList words={optionsWords(recording.import)} />
        </Entry>
      </chakra.dl>
    </Section>
  );
}

function Entry({ caption, children }: { caption: string; children: ReactNode }) {
  return (
    <>
      <chakra.dt color="inkSoft">{caption}</chakra.dt>
      <chakra.dd mb={{ base: '2', sm: '0' }}>{children}</chakra.dd>
    </>
  );
}
