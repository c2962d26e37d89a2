import type { LimitSet } from '@overtally/contracts';

/** A limit set where one is chosen: its name, its version where there are several, and a warning of unsure values. */
export function limitSetChoice(set: Pick<LimitSet, 'standard' | 'title' | 'version' | 'confidence'>): string {
  const version = set.version > 1 ? `, version ${set.version}` : '';
  const warning = set.confidence === 'low' ? ' (low confidence)' : '';
  return `${limitSetName(set)}${version}${warning}`;
}

/** A limit set by standard and title; the standard is not said twice. */
export function limitSetName({ standard, title }: Pick<LimitSet, 'standard' | 'title'>): string {
  return standard === '' || title.startsWith(standard) ? title : `${standard}: ${title}`;
}
