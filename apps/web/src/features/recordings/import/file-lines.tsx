import { chakra } from '@chakra-ui/react';
import { useEffect, useRef } from 'react';
import { PreviewFrame } from './preview-frame.js';

interface FileLinesProps {
  lines: readonly string[];
  /** Line that something is said of, counted from 1. */
  marked: number | null;
  /** Told apart by its moment, so that the same line can be shown twice. */
  shown: { line: number; at: number } | null;
}

/** The first lines of a file as they are, numbered; one of them can be marked and brought into view. */
export function FileLines({ lines, marked, shown }: FileLinesProps) {
  const list = useRef<HTMLOListElement>(null);
  useEffect(() => {
    if (!shown) return;
    const line = list.current?.children[shown.line - 1];
    if (!(line instanceof HTMLElement)) return;
    line.scrollIntoView({ block: 'nearest', inline: 'nearest' });
    line.focus({ preventScroll: true });
  }, [shown]);
  return (
    <PreviewFrame title="The file’s first lines">
      <chakra.ol ref={list} fontFamily="mono" fontSize="xs" listStyleType="none" minW="max-content" py="1">
        {lines.map((line, index) => {
          const isMarked = index + 1 === (shown?.line ?? marked);
          return (
            // Lines of a file have no other name than their number.
            <chakra.li
              key={index}
              display="flex"
              whiteSpace="pre"
              px="2"
              tabIndex={-1}
              aria-current={isMarked ? 'true' : undefined}
              bg={isMarked ? 'wash' : undefined}
              boxShadow={isMarked ? 'inset 3px 0 0 var(--chakra-colors-over)' : undefined}
              _focusVisible={{ outlineOffset: '-2px' }}
            >
              <chakra.span
                color={isMarked ? 'over' : 'inkSoft'}
                fontWeight={isMarked ? '600' : '400'}
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
          );
        })}
      </chakra.ol>
    </PreviewFrame>
  );
}
