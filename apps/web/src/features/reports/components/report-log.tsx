import { Text } from '@chakra-ui/react';
import type { ReportEvent } from '@overtally/contracts';
import { MarginColumn, MarginItem } from '../../../components/margin-column.js';
import { formatDateTime } from '../../../lib/format-date.js';
import { eventWords } from '../report-words.js';

/** Who did what and when, the newest first, with what they wrote. */
export function ReportLog({ events }: { events: readonly ReportEvent[] }) {
  return (
    <MarginColumn title="Log">
      {events.toReversed().map((event) => (
        <MarginItem
          key={`${event.kind} ${event.at}`}
          title={eventWords[event.kind]}
          foot={`${event.by.name}, ${formatDateTime(event.at)}`}
          {...(event.kind === 'returned' ? { tone: 'near' as const } : {})}
        >
          {event.comment ? <Text whiteSpace="pre-line">{event.comment}</Text> : null}
        </MarginItem>
      ))}
    </MarginColumn>
  );
}
