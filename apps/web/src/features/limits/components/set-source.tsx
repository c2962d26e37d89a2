import { Box, Text } from '@chakra-ui/react';
import type { LimitSet } from '@overtally/contracts';
import { confidenceWords, evidenceWords } from '../limit-words.js';

/** Edition and source of a set, how far its values can be relied on, and that the current edition decides. */
export function SetSource({ set }: { set: LimitSet }) {
  const { edition, confidence, evidence, source } = set;
  return (
    <Box as="section" aria-label="Source of the limits" fontSize="13px" color="inkSoft">
      <Text
        color={confidence === 'low' ? 'near' : undefined}
        fontWeight={confidence === 'low' ? '600' : undefined}
      >
        Edition {edition || 'not stated'}. Confidence {confidenceWords[confidence]}. Check the current edition
        before relying on the result.
      </Text>
      <Text overflowWrap="anywhere">
        {source.length === 1 ? 'Source' : 'Sources'}: {source.join('; ')}. {evidenceWords(evidence)}.
      </Text>
    </Box>
  );
}
