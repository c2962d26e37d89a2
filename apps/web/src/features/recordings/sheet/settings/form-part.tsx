import { Box, chakra, Text } from '@chakra-ui/react';
import { useId, useState, type ReactNode } from 'react';

interface FormPartProps {
  title: string;
  /** What is set in it, while it is closed. */
  summary: string;
  /** True while something in it is wrong: opens it. */
  isWrong: boolean;
  children: ReactNode;
}

/** A part of a long form that opens on request; its fields stay in the form while it is closed. */
export function FormPart({ title, summary, isWrong, children }: FormPartProps) {
  const id = useId();
  const [open, setOpen] = useState(false);
  if (isWrong && !open) setOpen(true);
  return (
    <Box borderTopWidth="1px" borderColor="rule" pt="2">
      <chakra.button
        type="button"
        display="flex"
        alignItems="baseline"
        flexWrap="wrap"
        columnGap="3"
        w="full"
        textAlign="start"
        cursor="pointer"
        py="1"
        aria-expanded={open}
        aria-controls={id}
        onClick={() => setOpen(!open)}
      >
        <Box as="span" color="act" fontWeight="600">
          {open ? '−' : '+'} {title}
        </Box>
        {open ? null : (
          <Text as="span" color="inkSoft" fontSize="13px">
            {summary}
          </Text>
        )}
      </chakra.button>
      <Box id={id} hidden={!open} pt="2" pb="1">
        {children}
      </Box>
    </Box>
  );
}
