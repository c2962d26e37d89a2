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
      display={{ base: 'grid', sm: 'flex' }}
      gridTemplateColumns="1fr 1fr"
      flexWrap="wrap"
      gap="1px"
      bg="rule"
      borderWidth="1px"
      borderColor="ruleStrong"
      borderRadius="3px"
      overflow="hidden"
      mb="4"
    >
      {cells.map((cell, index) => (
        <Box
          key={cell.caption}
          bg="sheet"
          px="3"
          py="2"
          flexGrow={cell.grow ?? 1}
          flexBasis={`${(cell.grow ?? 1) * 104}px`}
          // Two columns on a narrow screen: an odd last cell takes the whole line, so that the rules meet.
          gridColumn={index === cells.length - 1 && index % 2 === 0 ? 'span 2' : undefined}
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
