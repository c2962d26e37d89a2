import { Box, chakra, Heading } from '@chakra-ui/react';
import { useId } from 'react';

/** The first lines of a file as they are, numbered. */
export function FileLines({ lines }: { lines: readonly string[] }) {
  const id = useId();
  return (
    <Box minW="0">
      <Heading as="h3" id={id} fontSize="xs" color="inkSoft" fontWeight="400" mb="1">
        The file’s first lines
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
        py="1"
      >
        <chakra.ol fontFamily="mono" fontSize="xs" listStyleType="none" minW="max-content">
          {lines.map((line, index) => (
            // Lines of a file have no other name than their number.
            <chakra.li key={index} display="flex" whiteSpace="pre" px="2">
              <chakra.span
                color="inkSoft"
                w="3ch"
                mr="3"
                textAlign="end"
                userSelect="none"
                aria-hidden="true"
              >
                {index + 1}
              </chakra.span>
              {line}
            </chakra.li>
          ))}
        </chakra.ol>
      </Box>
    </Box>
  );
}
