import { Box, Flex, Heading } from '@chakra-ui/react';
import { useId, type ReactNode } from 'react';

interface PreviewFrameProps {
  title: string;
  /** Stands at the right of the caption. */
  tools?: ReactNode;
  /** False for a picture that is always seen whole. */
  scrolls?: boolean;
  children: ReactNode;
}

/** A captioned part of the preview; what is larger scrolls in itself, also by keyboard. */
export function PreviewFrame({ title, tools, scrolls = true, children }: PreviewFrameProps) {
  const id = useId();
  return (
    <Box minW="0">
      <Flex justify="space-between" align="flex-end" wrap="wrap" columnGap="4" mb="1">
        <Heading as="h3" id={id} fontSize="xs" lineHeight="1.45" color="inkSoft" fontWeight="400">
          {title}
        </Heading>
        {tools}
      </Flex>
      <Box
        role="region"
        aria-labelledby={id}
        borderWidth="1px"
        borderColor="rule"
        borderRadius="3px"
        {...(scrolls ? { tabIndex: 0, overflow: 'auto', maxH: '260px' } : {})}
      >
        {children}
      </Box>
    </Box>
  );
}
