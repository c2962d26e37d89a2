import type { LimitSet } from '@overtally/contracts';

/** A limit set by standard and title; the standard is not said twice. */
export function limitSetName({ standard, title }: Pick<LimitSet, 'standard' | 'title'>): string {
  return standard === '' || title.startsWith(standard) ? title : `${standard}: ${title}`;
}
