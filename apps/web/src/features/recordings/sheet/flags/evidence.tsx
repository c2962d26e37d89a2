import { Button, Flex, Text } from '@chakra-ui/react';
import type { FlagEvidence } from '@overtally/contracts';
import { useState } from 'react';
import { comparedWords, countWords, placeWords } from './evidence-words.js';

interface EvidenceProps {
  /** Times count from the first sample of the record. */
  evidence: FlagEvidence;
  /** Shows a place in the waveform. */
  onTime: (timeS: number) => void;
}

/** Places shown before the rest is asked for. */
const shownFirst = 4;

/** What a flag rests on: how often, what against what, and where; a place leads to the waveform. */
export function Evidence({ evidence, onTime }: EvidenceProps) {
  const [open, setOpen] = useState(false);
  const { count, timesS } = evidence;
  const facts = [countWords(evidence), comparedWords(evidence)].filter((words) => words !== null);
  const shown = open ? timesS : timesS.slice(0, shownFirst);
  const unlisted = count - timesS.length;
  return (
    <>
      {facts.length > 0 ? (
        <Text fontSize="xs" color="inkSoft" mt="0.5">
          {facts.join(', ')}
        </Text>
      ) : null}
      {timesS.length > 0 ? (
        <Flex wrap="wrap" columnGap="1" ml="-1.5" align="center">
          {shown.map((timeS) => (
            <Button
              key={timeS}
              size="2xs"
              variant="ghost"
              fontFamily="mono"
              fontWeight="400"
              px="1.5"
              aria-label={`Show ${placeWords(timeS)} in the waveform`}
              onClick={() => onTime(timeS)}
            >
              {placeWords(timeS)}
            </Button>
          ))}
          {timesS.length > shownFirst ? (
            <Button size="2xs" variant="ghost" px="1.5" aria-expanded={open} onClick={() => setOpen(!open)}>
              {open ? 'fewer' : `${timesS.length - shownFirst} more`}
            </Button>
          ) : null}
          {open && unlisted > 0 ? (
            <Text fontSize="xs" color="inkSoft">
              and {unlisted} later
            </Text>
          ) : null}
        </Flex>
      ) : null}
    </>
  );
}
