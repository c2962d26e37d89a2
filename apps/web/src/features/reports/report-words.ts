import type { Note, Report, ReportEvent, ReportStatus, Settings } from '@overtally/contracts';
import { formatDuration, formatHz } from '../../lib/format.js';

export const statusWords: Record<ReportStatus, string> = {
  draft: 'Draft',
  'in-review': 'In review',
  issued: 'Issued',
  superseded: 'Superseded',
};

/** Where a report stands; a draft that came back from review is told apart. */
export const standingWords = ({ status, returned }: Pick<Report, 'status' | 'returned'>): string =>
  returned ? 'Returned' : statusWords[status];

export const eventWords: Record<ReportEvent['kind'], string> = {
  created: 'Draft made',
  changed: 'Changed',
  submitted: 'Submitted for review',
  withdrawn: 'Withdrawn from review',
  returned: 'Returned',
  issued: 'Issued',
  superseded: 'Superseded',
  commented: 'Comment',
};

/** What a note speaks of: "Order 15", "151.2 Hz", "from 1.20 s to 1.40 s". */
export function targetWords(target: Note['target']): string {
  switch (target.kind) {
    case 'order':
      return `Order ${target.order}`;
    case 'line':
      return formatHz(target.frequencyHz, 1);
    case 'span':
      return `From ${formatDuration(target.fromS)} to ${formatDuration(target.toS)}`;
  }
}

/** Settings of an analysis in words, as far as they were stated. */
export function settingsWords(settings: Settings): string {
  const { nominalFrequencyHz, window, maxOrder, thdMaxOrder, cyclesPerWindow, span } = settings;
  const parts = [
    `profile ${settings.profile}`,
    nominalFrequencyHz === 'auto'
      ? 'fundamental found by search'
      : `nominal ${formatHz(nominalFrequencyHz, 1)}`,
    cyclesPerWindow === undefined ? '' : `${cyclesPerWindow} cycles a window`,
    window === undefined ? '' : `${window} window for the drawn spectrum`,
    maxOrder === undefined ? '' : `orders to ${maxOrder}`,
    thdMaxOrder === undefined ? '' : `THD to order ${thdMaxOrder}`,
    span === undefined ? '' : `span ${formatDuration(span.fromS)} to ${formatDuration(span.toS)}`,
  ];
  return parts.filter(Boolean).join(', ');
}
