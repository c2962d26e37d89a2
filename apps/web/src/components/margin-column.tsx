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
  /** Author and day. */
  foot?: ReactNode;
  children?: ReactNode;
}

/** One entry of the margin. */
export function MarginItem({ letter, title, tone, foot, children }: MarginItemProps) {
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
