import type { Judgement } from './decision.js';

/** Why a comparison did not end in a plain pass; null when it did. `subject` begins the sentence. */
export function comparisonReason(
  subject: string,
  value: number,
  limit: number,
  result: Judgement,
): string | null {
  switch (result) {
    case 'pass':
      return null;
    case 'fail':
      return value > limit
        ? `${subject} above the limit`
        : `${subject} inside the guard band below the limit`;
    case 'conditional-pass':
      return `${subject} below the limit by less than the expanded uncertainty`;
    case 'conditional-fail':
      return `${subject} above the limit by less than the expanded uncertainty`;
    case 'not-decidable':
      return `${subject} cannot be decided`;
  }
}
