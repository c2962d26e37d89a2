import { Box, chakra, Flex, Heading, Text } from '@chakra-ui/react';
import { useId, type ReactNode } from 'react';

interface MarginLayoutProps {
  children: ReactNode;
  margin: ReactNode;
}

/** The figure area with the margin at its right; under it on narrow screens. */
export function MarginLayout({ children, margin }: MarginLayoutProps) {
  return (
    <Flex direction={{ base: 'column', xl: 'row' }} align="flex-start" gap={{ base: '6', xl: '6' }}>
      <Box flex="1" minW="0" w="full">
        {children}
      </Box>
      <Box w={{ base: 'full', xl: '292px' }} flexShrink="0">
        {margin}
      </Box>
    </Flex>
  );
}

interface MarginRowProps {
  /** Names the margin for screen readers: "Margin beside the waveform". */
  label: string;
  /** Heading of the margin, over the first row of a page. */
  title?: string;
  /** What is said about the figure; the column stays free where nothing is. */
  margin?: ReactNode;
  children: ReactNode;
}

/** A figure with what the margin says about it at its right, or under it on narrow screens. */
export function MarginRow({ label, title, margin, children }: MarginRowProps) {
  return (
    <Flex direction={{ base: 'column', xl: 'row' }} align="flex-start" columnGap="6">
      <Box flex="1" minW="0" w="full">
        {children}
      </Box>
      <chakra.aside
        aria-label={label}
        w={{ base: 'full', xl: '292px' }}
        flexShrink="0"
        mb={{ base: '4', xl: '4' }}
        css={{ '&:empty': { marginBottom: 0 } }}
      >
        {title ? (
          <Heading
            as="h2"
            fontSize="sm"
            lineHeight="1.45"
            pb="2"
            borderBottomWidth="2px"
            borderColor="ink"
            hideBelow="xl"
          >
            {title}
          </Heading>
        ) : null}
        {margin}
      </chakra.aside>
    </Flex>
  );
}

/** Column for what would be pencilled beside a figure: flags, notes, legends. */
export function MarginColumn({
  title,
  actions,
  children,
}: {
  title: string;
  actions?: ReactNode;
  children: ReactNode;
}) {
  const id = useId();
  return (
    <chakra.aside aria-labelledby={id}>
      <Flex justify="space-between" align="center" pb="2" borderBottomWidth="2px" borderColor="ink">
        <Heading as="h2" id={id} fontSize="sm" lineHeight="1.45">
          {title}
        </Heading>
        {actions}
      </Flex>
      {children}
    </chakra.aside>
  );
}

interface MarginItemProps {
  /** Letter that stands at the same place in the figure. */
  letter?: string;
  title?: ReactNode;
  /** Draws a bar at the side for flags. */
  tone?: 'over' | 'near' | 'act';
  /** Stands behind the title: "error". */
  aside?: string;
  /** Author and day. */
  foot?: ReactNode;
  children?: ReactNode;
}

/** One entry of the margin. */
export function MarginItem({ letter, title, tone, aside, foot, children }: MarginItemProps) {
  return (
    <Box py="3" borderBottomWidth="1px" borderColor="rule" _last={{ borderBottomWidth: '0' }} fontSize="13px">
      <Box borderLeftWidth={tone ? '3px' : '0'} borderColor={tone} pl={tone ? '2.5' : '0'}>
        {title ? (
          <Text fontWeight="600" fontSize="13px">
            {letter ? (
              <Box as="span" color="over" mr="2">
                {letter}
              </Box>
            ) : null}
            {title}
            {aside ? (
              <Box as="span" fontWeight="400" color="inkSoft">
                {` ${aside}`}
              </Box>
            ) : null}
          </Text>
        ) : null}
        {children}
        {foot ? (
          <Text fontSize="xs" color="inkSoft">
            {foot}
          </Text>
        ) : null}
      </Box>
    </Box>
  );
}
