import { Box, Flex, Text } from '@chakra-ui/react';
import type { Report, ReportEvent } from '@overtally/contracts';
import { formatDateTime } from '../../../lib/format-date.js';

const steps = [
  { status: 'draft', label: 'Draft', kind: 'created' },
  { status: 'in-review', label: 'In review', kind: 'submitted' },
  { status: 'issued', label: 'Issued', kind: 'issued' },
] as const;

/** Where the report stands on its way, with who brought it there. */
export function ReportSteps({ report }: { report: Pick<Report, 'status' | 'events' | 'returned'> }) {
  const at = report.status === 'superseded' ? 2 : steps.findIndex(({ status }) => status === report.status);
  return (
    <Flex as="ol" aria-label="Way of the report" listStyleType="none" gap="1" mb="4">
      {steps.map(({ label, kind }, index) => {
        const event = index <= at ? lastOf(report.events, kind) : null;
        return (
          <Box
            as="li"
            key={kind}
            flex="1"
            minW="0"
            borderTopWidth={index <= at ? '3px' : '1px'}
            borderColor={index === at ? 'act' : index < at ? 'ink' : 'ruleStrong'}
            pt={index <= at ? '1.5' : '8px'}
            aria-current={index === at ? 'step' : undefined}
          >
            <Text fontWeight={index === at ? '600' : '400'} color={index <= at ? 'ink' : 'inkSoft'}>
              {label}
              {index === 0 && at === 0 && report.returned ? ', returned' : ''}
              {index === at && report.status === 'superseded' ? ', superseded' : ''}
            </Text>
            <Text fontSize="13px" color="inkSoft">
              {event ? `${event.by.name}, ${formatDateTime(event.at)}` : ''}
            </Text>
          </Box>
        );
      })}
    </Flex>
  );
}

const lastOf = (events: readonly ReportEvent[], kind: ReportEvent['kind']): ReportEvent | null =>
  events.findLast((event) => event.kind === kind) ?? null;
