import { Box } from '@chakra-ui/react';

/** What the server said about a whole form: pass `errors.root?.message`. */
export function FormProblem({ message }: { message: string | undefined }) {
  if (message === undefined) return null;
  return (
    <Box role="alert" borderLeftWidth="3px" borderColor="over" pl="3" py="1">
      {message}
    </Box>
  );
}
