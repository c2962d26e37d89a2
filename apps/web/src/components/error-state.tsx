import { Box, Button, Flex, Heading, Text } from '@chakra-ui/react';
import { ApiProblem, problemText } from '../lib/api-problem.js';

interface ErrorStateProps {
  error: unknown;
  /** Replaces the problem's own title. */
  title?: string;
  onRetry?: () => void;
}

/** What went wrong, as the server put it, with another try where that makes sense. */
export function ErrorState({ error, title, onRetry }: ErrorStateProps) {
  const problem = error instanceof ApiProblem ? error : null;
  const heading = title ?? problem?.title ?? 'Something went wrong';
  const text = problemText(error);
  return (
    <Flex
      role="alert"
      borderLeftWidth="3px"
      borderColor="over"
      pl="4"
      py="1"
      direction="column"
      gap="1"
      align="flex-start"
    >
      <Heading as="h2" fontSize="md" lineHeight="1.3">
        {heading}
      </Heading>
      {text === heading ? null : <Text maxW="70ch">{text}</Text>}
      {problem?.errors.length ? (
        <Box as="ul" pl="5" listStyleType="disc">
          {problem.errors.map((entry) => (
            <li key={`${entry.path} ${entry.message}`}>{entry.message}</li>
          ))}
        </Box>
      ) : null}
      {problem?.instance ? (
        <Text fontSize="xs" color="inkSoft">
          Request {problem.instance}
        </Text>
      ) : null}
      {onRetry ? (
        <Button mt="2" onClick={onRetry}>
          Try again
        </Button>
      ) : null}
    </Flex>
  );
}
