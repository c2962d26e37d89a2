import { Box, VisuallyHidden } from '@chakra-ui/react';

interface LoadingStateProps {
  /** What is being fetched: "Loading the recordings". */
  label: string;
  lines?: number;
}

const widths = ['62%', '84%', '71%', '90%', '55%'];

/** Ruled lines where text will stand; they do not move. */
export function LoadingState({ label, lines = 4 }: LoadingStateProps) {
  return (
    <Box role="status" py="2">
      <VisuallyHidden>{label}</VisuallyHidden>
      {Array.from({ length: lines }, (_, line) => (
        <Box
          key={line}
          h="3"
          my="3.5"
          maxW="4xl"
          w={widths[line % widths.length]}
          bg="rule"
          opacity="0.6"
          borderRadius="3px"
        />
      ))}
    </Box>
  );
}
