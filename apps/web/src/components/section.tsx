import { Box, chakra, Flex, Heading, Text } from '@chakra-ui/react';
import { useId, type ReactNode } from 'react';

interface SectionProps {
  title: string;
  lead?: ReactNode;
  actions?: ReactNode;
  /** Space above, where the section follows something that is not one. */
  mt?: string;
  children: ReactNode;
}

/** A part of a page that begins with one bold line. */
export function Section({ title, lead, actions, mt, children }: SectionProps) {
  const id = useId();
  return (
    <chakra.section aria-labelledby={id} mt={mt} mb="10">
      <Flex
        align="flex-end"
        justify="space-between"
        gap="4"
        wrap="wrap"
        pb="2"
        borderBottomWidth="2px"
        borderColor="ink"
      >
        <Box>
          <Heading as="h2" id={id} fontSize="md" lineHeight="1.3">
            {title}
          </Heading>
          {lead ? <Text color="inkSoft">{lead}</Text> : null}
        </Box>
        {actions}
      </Flex>
      <Box pt="4">{children}</Box>
    </chakra.section>
  );
}
