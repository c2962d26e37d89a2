import { chakra } from '@chakra-ui/react';
import type { ReactNode } from 'react';

export type Sort = { key: string; descending: boolean } | null;

interface SortButtonProps {
  column: string;
  sort: Sort;
  onSort: (sort: Sort) => void;
  children: ReactNode;
}

/** Heading of a sortable column: first up, then down. */
export function SortButton({ column, sort, onSort, children }: SortButtonProps) {
  const mine = sort?.key === column ? sort : null;
  return (
    <chakra.button
      type="button"
      color={mine ? 'ink' : 'inkSoft'}
      fontWeight={mine ? '600' : '400'}
      cursor="pointer"
      whiteSpace="nowrap"
      onClick={() => onSort({ key: column, descending: mine ? !mine.descending : false })}
    >
      {children}
      {mine ? <span aria-hidden="true">{mine.descending ? ' ↓' : ' ↑'}</span> : null}
    </chakra.button>
  );
}
