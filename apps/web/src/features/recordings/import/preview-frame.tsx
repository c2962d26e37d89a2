import { Box, Heading } from '@chakra-ui/react';
import { useId, type ReactNode } from 'react';

/** A captioned part of the preview that scrolls in itself, also by keyboard. */
export function PreviewFrame({ title, children }: { title: string; children: ReactNode }) {
  const id = useId();
  return (
    <Box minW="0">
      <Heading as="h3" id={id} fontSize="xs" color="inkSoft" fontWeight="400" mb="1">
        {title}
      </Heading>
      <Box
        role="region"
        aria-labelledby={id}
        tabIndex={0}
        borderWidth="1px"
        borderColor="rule"
        borderRadius="3px"
        overflow="auto"
        maxH="260px"
      >
        {children}
      </Box>
    </Box>
  );
}
