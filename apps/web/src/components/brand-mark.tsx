import { chakra, HStack, Text } from '@chakra-ui/react';

interface BrandMarkProps {
  /** Height in px. */
  size?: number;
  /** Shows the name beside the mark. */
  named?: boolean;
}

/** Four falling strokes, the orders, and one stroke through them: a tally of five. */
export function BrandMark({ size = 20, named = false }: BrandMarkProps) {
  return (
    <HStack as="span" gap="3" display="inline-flex">
      <chakra.svg viewBox="0 0 30 20" height={`${size}px`} width={`${size * 1.5}px`} aria-hidden="true">
        <chakra.path d="M6 1v18M12 6v13M18 10v9M24 14v5" stroke="ink" strokeWidth="2.2" fill="none" />
        <chakra.path d="M1 16.5 29 6.5" stroke="over" strokeWidth="2.4" fill="none" strokeLinecap="round" />
      </chakra.svg>
      {named ? (
        <Text as="span" fontWeight="600" fontSize="md" letterSpacing="-0.005em">
          overtally
        </Text>
      ) : null}
    </HStack>
  );
}
