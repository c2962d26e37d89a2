import { Box, chakra } from '@chakra-ui/react';
import type { ReactNode } from 'react';

export interface TitleCell {
  caption: string;
  value: ReactNode;
  /** Digits and codes that should align or be copied. */
  mono?: boolean;
  tone?: 'over' | 'near' | 'within';
  /** Share of the width, 1 when absent. */
  grow?: number;
  /** Whole value where `value` is shortened. */
  title?: string;
}

/** Cells with small captions over a recording or a report, as on an engineering drawing. */
export function TitleBlock({ cells, label }: { cells: readonly TitleCell[]; label: string }) {
  return (
    <Box
      as="dl"
      aria-label={label}
      display="flex"
      flexWrap="wrap"
      gap="1px"
      bg="rule"
      borderWidth="1px"
      borderColor="ruleStrong"
      borderRadius="3px"
      overflow="hidden"
      mb="4"
    >
      {cells.map((cell) => (
        <Box
          key={cell.caption}
          bg="sheet"
          px="3"
          py="2"
          flexGrow={cell.grow ?? 1}
          flexBasis={{ base: '40%', sm: `${(cell.grow ?? 1) * 104}px` }}
          minW="0"
        >
          <chakra.dt fontSize="xs" color="inkSoft">
            {cell.caption}
          </chakra.dt>
          <chakra.dd
            title={cell.title}
            fontFamily={cell.mono ? 'mono' : undefined}
            fontSize={cell.mono ? '13px' : 'sm'}
            fontWeight={cell.tone ? '600' : '400'}
            color={cell.tone}
            overflowWrap="anywhere"
            minH="1.45em"
          >
            {cell.value}
          </chakra.dd>
        </Box>
      ))}
    </Box>
  );
}
