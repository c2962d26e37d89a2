import { Box } from '@chakra-ui/react';
import { LoadingState } from '../../components/loading-state.js';

/** Shown until the first page has been fetched. */
export function StartingUp() {
  return (
    <Box p="7">
      <LoadingState label="Loading Overtally" />
    </Box>
  );
}
