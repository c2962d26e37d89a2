import { Button, Table, Text } from '@chakra-ui/react';
import type { Verdict } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { useState, type ReactNode } from 'react';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { Modal } from '../../../components/modal.js';
import { Section } from '../../../components/section.js';
import { TallyStrip } from '../../../components/tally-strip.js';
import { ResultWords } from '../../../components/verdict/result-words.js';
import { decisionRuleNames } from '../../../components/verdict/verdict-words.js';
import { formatDateTime } from '../../../lib/format-date.js';
import { limitSetName } from '../../../lib/limit-set-name.js';
import { analysisVerdictsQuery } from '../api/list-verdicts.js';
import { VerdictView } from './verdict-view.js';

interface VerdictListProps {
  analysisId: string;
  /** Recording as people call it: R-0147. */
  subject: string;
  /** The way to judge, where the reader may. */
  actions?: ReactNode;
  /** What can be done with an opened verdict. */
  verdictActions?: (verdict: Verdict) => ReactNode;
}

/** Verdicts on an analysis, the newest first; each opens with its numbers. */
export function VerdictList({ analysisId, subject, actions, verdictActions }: VerdictListProps) {
  const verdicts = useQuery(analysisVerdictsQuery(analysisId));
  const [opened, setOpened] = useState<Verdict | null>(null);
  return (
    <Section title="Verdicts" actions={actions}>
      {verdicts.isPending ? <LoadingState label="Loading the verdicts" lines={2} /> : null}
      {verdicts.isError ? (
        <ErrorState error={verdicts.error} onRetry={() => void verdicts.refetch()} />
      ) : null}
      {verdicts.isSuccess && verdicts.data.length === 0 ? (
        <Text color="inkSoft">
          Not judged yet. A verdict applies a limit set by a stated decision rule; reports are made of
          verdicts.
        </Text>
      ) : null}
      {verdicts.isSuccess && verdicts.data.length > 0 ? (
        <VerdictTable verdicts={verdicts.data} onOpen={setOpened} />
      ) : null}
      {opened ? (
        <Modal
          open
          onClose={() => setOpened(null)}
          title={`Verdict on ${subject}`}
          size="xl"
          footer={verdictActions?.(opened)}
        >
          <VerdictView verdict={opened} subject={subject} />
        </Modal>
      ) : null}
    </Section>
  );
}

function VerdictTable({
  verdicts,
  onOpen,
}: {
  verdicts: readonly Verdict[];
  onOpen: (verdict: Verdict) => void;
}) {
  return (
    <Table.ScrollArea>
      <Table.Root size="sm">
        <Table.Header>
          <Table.Row>
            <Table.ColumnHeader scope="col">Result</Table.ColumnHeader>
            <Table.ColumnHeader scope="col">Channel</Table.ColumnHeader>
            <Table.ColumnHeader scope="col">Limit set</Table.ColumnHeader>
            <Table.ColumnHeader scope="col" hideBelow="md">
              Orders 2 to 40
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col" hideBelow="md">
              Decision rule
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col" hideBelow="lg">
              Judged
            </Table.ColumnHeader>
          </Table.Row>
        </Table.Header>
        <Table.Body>
          {verdicts.map((verdict) => (
            <Table.Row key={verdict.id}>
              <Table.Cell>
                <ResultWords result={verdict.result} />
                <Text color="inkSoft" fontSize="xs">
                  {verdict.reason}
                </Text>
              </Table.Cell>
              <Table.Cell>{verdict.channelName}</Table.Cell>
              <Table.Cell>
                <Button variant="plain" size="sm" px="0" h="auto" color="act" onClick={() => onOpen(verdict)}>
                  {limitSetName(verdict.limitSet)}
                </Button>
              </Table.Cell>
              <Table.Cell hideBelow="md">
                <TallyStrip shares={verdict.orders} />
              </Table.Cell>
              <Table.Cell hideBelow="md">{decisionRuleNames[verdict.decisionRule]}</Table.Cell>
              <Table.Cell hideBelow="lg" color="inkSoft">
                {verdict.author.name}, {formatDateTime(verdict.createdAt)}
              </Table.Cell>
            </Table.Row>
          ))}
        </Table.Body>
      </Table.Root>
    </Table.ScrollArea>
  );
}
