import type { CreateNote } from '@overtally/contracts';
import { formatDuration, formatHz } from '../../../lib/format.js';

/** What a note speaks of: an order, a line or a time span. */
export type NoteTarget = CreateNote['target'];

export function targetWords(target: NoteTarget): string {
  switch (target.kind) {
    case 'order':
      return `Order ${target.order}`;
    case 'line':
      return `Line at ${formatHz(target.frequencyHz, 2)}`;
    case 'span':
      return `${formatDuration(target.fromS)} to ${formatDuration(target.toS)}`;
  }
}
