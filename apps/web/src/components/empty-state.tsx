import { Flex, Heading, Text } from '@chakra-ui/react';
import type { ReactNode } from 'react';

interface EmptyStateProps {
  title: string;
  /** What to do next. */
  children: ReactNode;
  actions?: ReactNode;
}

/** Nothing is here yet, and what to do about it. */
export function EmptyState({ title, children, actions }: EmptyStateProps) {
  return (
    <Flex
      direction="column"
      align="flex-start"
      gap="1"
      borderWidth="1px"
      borderStyle="dashed"
      borderColor="ruleStrong"
      borderRadius="3px"
      px={{ base: '4', md: '6' }}
      py="6"
    >
      <Heading as="h2" fontSize="md" lineHeight="1.3">
        {title}
      </Heading>
      <Text color="inkSoft" maxW="62ch">
        {children}
      </Text>
      {actions ? (
        <Flex gap="2" mt="3" wrap="wrap">
          {actions}
        </Flex>
      ) : null}
    </Flex>
  );
}
