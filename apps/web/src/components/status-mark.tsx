import { chakra, Flex, Text } from '@chakra-ui/react';
import type { ReactNode } from 'react';

type Tone = 'over' | 'near' | 'within';

interface StatusMarkProps {
  tone: Tone;
  children: ReactNode;
}

/** A finding in words behind a mark of its own shape, so that colour is not needed to tell it. */
export function StatusMark({ tone, children }: StatusMarkProps) {
  return (
    <Flex as="span" display="inline-flex" gap="2.5" align="flex-start">
      <chakra.svg viewBox="0 0 20 20" w="5" h="5" mt="2px" flexShrink="0" aria-hidden="true" color={tone}>
        <path d={shapes[tone]} fill="none" stroke="currentColor" strokeWidth="2" strokeLinejoin="round" />
        <path d={strokes[tone]} fill="none" stroke="currentColor" strokeWidth="2.2" strokeLinecap="round" />
      </chakra.svg>
      <Text as="span" fontWeight="600" color={tone} fontSize="md">
        {children}
      </Text>
    </Flex>
  );
}

/** A disc, a triangle, an octagon. */
const shapes: Record<Tone, string> = {
  within: 'M10 1.5a8.5 8.5 0 1 1 0 17a8.5 8.5 0 1 1 0-17Z',
  near: 'M10 2 18.5 17.5h-17Z',
  over: 'M6.5 1.5h7l5 5v7l-5 5h-7l-5-5v-7Z',
};

/** A tick, an exclamation, a cross. */
const strokes: Record<Tone, string> = {
  within: 'm6 10.3 2.8 2.8L14 7.4',
  near: 'M10 7.5v4.5M10 14.9v.1',
  over: 'm6.8 6.8 6.4 6.4M13.2 6.8l-6.4 6.4',
};
