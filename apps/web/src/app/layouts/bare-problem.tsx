import { Box } from '@chakra-ui/react';
import { RouteProblem } from './route-problem.js';

/** A problem before there is a frame to show it in. */
export function BareProblem() {
  return (
    <Box as="main" px={{ base: '4', md: '7' }} py="4">
      <RouteProblem />
    </Box>
  );
}
