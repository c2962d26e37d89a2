import { Box, Flex, Heading, Text } from '@chakra-ui/react';
import type { ReactNode } from 'react';
import { BrandMark } from '../../components/brand-mark.js';
import { Sheet } from '../../components/sheet.js';
import { ThemeSwitch } from '../../components/theme-switch.js';

interface BarePageProps {
  title: string;
  children: ReactNode;
  /** Below the sheet. */
  foot?: ReactNode;
}

/** A page for somebody who is not signed in: one sheet under the mark. */
export function BarePage({ title, children, foot }: BarePageProps) {
  return (
    <Flex direction="column" minH="100dvh" px="4">
      <title>{`${title} · Overtally`}</title>
      <Flex justify="flex-end" py="2">
        <ThemeSwitch />
      </Flex>
      <Flex as="main" flex="1" direction="column" align="center" justify="center" pb="16">
        <Box w="full" maxW="360px">
          <Box mb="5">
            <BrandMark named />
          </Box>
          <Sheet px="6" py="6">
            <Heading as="h1" fontSize="xl" lineHeight="1.25" mb="4" overflowWrap="anywhere">
              {title}
            </Heading>
            {children}
          </Sheet>
          {foot ? (
            <Text as="div" color="inkSoft" fontSize="13px" mt="4">
              {foot}
            </Text>
          ) : null}
        </Box>
      </Flex>
      <Text as="footer" color="inkSoft" fontSize="xs" textAlign="center" py="4" mx="auto" maxW="70ch">
        Work on mains circuits can kill: only qualified persons, with rated probes and isolation, under the
        local codes.
      </Text>
    </Flex>
  );
}
