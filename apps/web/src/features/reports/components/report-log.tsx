import { Text } from '@chakra-ui/react';
import type { ReportEvent } from '@overtally/contracts';
import type { ReactNode } from 'react';
import { MarginColumn, MarginItem } from '../../../components/margin-column.js';
import { formatDateTime } from '../../../lib/format-date.js';
import { eventWords } from '../report-words.js';

interface ReportLogProps {
  events: readonly ReportEvent[];
  /** Over the events: where to add one. */
  children?: ReactNode;
}

/** Who did what and when, the newest first, with what they wrote. */
export function ReportLog({ events, children }: ReportLogProps) {
  return (
    <MarginColumn title="Log">
      {children}
      {events.toReversed().map((event) => (
        <MarginItem
          key={`${event.kind} ${event.at} ${event.by.id}`}
          title={eventWords[event.kind]}
          foot={`${event.by.name}, ${formatDateTime(event.at)}`}
          {...(event.kind === 'returned' || event.kind === 'superseded' ? { tone: 'near' as const } : {})}
        >
          {event.comment ? <Text whiteSpace="pre-line">{event.comment}</Text> : null}
        </MarginItem>
      ))}
    </MarginColumn>
  );
}
