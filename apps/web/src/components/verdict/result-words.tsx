import { chakra } from '@chakra-ui/react';
import type { VerdictResult } from '@overtally/contracts';
import { verdictTone, verdictWords } from './verdict-words.js';

/** A verdict's result in one word or two, in its colour. */
export function ResultWords({ result }: { result: VerdictResult }) {
  return (
    <chakra.span fontWeight="600" color={verdictTone(result) ?? 'inkSoft'} whiteSpace="nowrap">
      {verdictWords[result]}
    </chakra.span>
  );
}
