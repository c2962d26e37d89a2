import { Box, Flex, Grid, Text } from '@chakra-ui/react';
import type { ReactNode } from 'react';
import { formatBytes } from '../../../lib/format.js';

interface RowGridProps {
  name: string;
  /** What stands in soft ink under the name: its folder, its parts. */
  origin?: string | undefined;
  sizeBytes: number;
  actions: ReactNode;
  children: ReactNode;
}

/** A line of the list of uploads: the file, how it stands, what can be done. */
export function RowGrid({ name, origin, sizeBytes, actions, children }: RowGridProps) {
  return (
    <Grid
      as="li"
      templateColumns={{ base: 'minmax(0, 1fr) auto', md: 'minmax(0, 1fr) minmax(0, 2fr) 168px' }}
      alignItems={{ base: 'start', md: 'center' }}
      columnGap="4"
      rowGap="1"
      borderTopWidth="1px"
      borderColor="rule"
      py="2"
    >
      <Box>
        <Text overflowWrap="anywhere">
          {name}{' '}
          <Box as="span" color="inkSoft" fontSize="13px" whiteSpace="nowrap">
            {formatBytes(sizeBytes)}
          </Box>
        </Text>
        {origin ? (
          <Text color="inkSoft" fontSize="xs" overflowWrap="anywhere">
            {origin}
          </Text>
        ) : null}
      </Box>
      <Box gridColumn={{ base: '1 / -1', md: 'auto' }} gridRow={{ base: 2, md: 'auto' }}>
        {children}
      </Box>
      <Flex justify="flex-end" gap="2" wrap="wrap">
        {actions}
      </Flex>
    </Grid>
  );
}
