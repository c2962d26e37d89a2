import { chakra } from '@chakra-ui/react';
import { PreviewFrame } from './preview-frame.js';

/** The first lines of a file as they are, numbered. */
export function FileLines({ lines }: { lines: readonly string[] }) {
  return (
    <PreviewFrame title="The file’s first lines">
      <chakra.ol fontFamily="mono" fontSize="xs" listStyleType="none" minW="max-content" py="1">
        {lines.map((line, index) => (
          // Lines of a file have no other name than their number.
          <chakra.li key={index} display="flex" whiteSpace="pre" px="2">
            <chakra.span color="inkSoft" w="3ch" mr="3" textAlign="end" userSelect="none" aria-hidden="true">
              {index + 1}
            </chakra.span>
            {line}
          </chakra.li>
        ))}
      </chakra.ol>
    </PreviewFrame>
  );
}
