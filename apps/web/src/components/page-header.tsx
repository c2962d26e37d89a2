import { Box, Flex, Heading, Text } from '@chakra-ui/react';
import type { ReactNode } from 'react';
import { useCrumb } from './crumb-context.js';

interface PageHeaderProps {
  title: string;
  subtitle?: ReactNode;
  /** Buttons at the right. */
  actions?: ReactNode;
  /** Short name of the page in the top bar, for pages below a tab: R-0147. */
  crumb?: string;
  /** What the browser's tab shows before the product's name; the title when absent. */
  documentTitle?: string;
}

/** Title of a page; also names the browser's tab and the last part of the path in the top bar. */
export function PageHeader({ title, subtitle, actions, crumb, documentTitle }: PageHeaderProps) {
  useCrumb(crumb ?? null);
  return (
    <Flex justify="space-between" align="flex-end" wrap="wrap" columnGap="6" rowGap="3" mb="4">
      <title>{`${documentTitle ?? title} · Overtally`}</title>
      <Box minW="0">
        <Heading as="h1" fontSize="2xl" lineHeight="1.25" overflowWrap="anywhere">
          {title}
        </Heading>
        {subtitle ? (
          <Text color="inkSoft" mt="0.5">
            {subtitle}
          </Text>
        ) : null}
      </Box>
      {actions ? (
        <Flex gap="2" wrap="wrap" align="center">
          {actions}
        </Flex>
      ) : null}
    </Flex>
  );
}
