import { Box, type BoxProps } from '@chakra-ui/react';

/** A surface lying on the paper. */
export function Sheet(props: BoxProps) {
  return <Box bg="sheet" borderWidth="1px" borderColor="rule" borderRadius="3px" {...props} />;
}
