import { Box, Button, Table, Text } from '@chakra-ui/react';
import type { Analysis } from '@overtally/contracts';
import { Section } from '../../../components/section.js';
import { none } from '../../../lib/format.js';
import { formatDateTime, formatDateTimeFull } from '../../../lib/format-date.js';
import { settingsWords } from './settings/settings-words.js';

type AnalysisHead = Omit<Analysis, 'channels' | 'power' | 'threePhase'>;

interface ProvenanceSectionProps {
  analyses: readonly AnalysisHead[];
  shownId: string | null;
  latestId: string | null;
  onShow: (analysisId: string) => void;
}

/** All analyses of the recording, newest first: settings, engine, by whom, when; any that is done can be looked at. */
export function ProvenanceSection({ analyses, shownId, latestId, onShow }: ProvenanceSectionProps) {
  if (analyses.length === 0) return null;
  return (
    <Section title="Analyses" lead="Never changed once made; a new one stands beside them." mt="8">
      <Box
        overflowX="auto"
        position="relative"
        tabIndex={0}
        role="region"
        aria-label="Analyses of this recording"
      >
        <Table.Root size="sm">
          <Table.Caption srOnly>Analyses of this recording</Table.Caption>
          <Table.Header>
            <Table.Row>
              {['Finished', 'Settings', 'Engine', 'Started by', 'Standing', ''].map((header) => (
                <Table.ColumnHeader key={header} scope="col">
                  {header || <Box srOnly>View</Box>}
                </Table.ColumnHeader>
              ))}
            </Table.Row>
          </Table.Header>
          <Table.Body>
            {analyses.map((analysis) => (
              <Table.Row key={analysis.id} bg={analysis.id === shownId ? 'wash' : undefined}>
                <Table.Cell whiteSpace="nowrap" title={formatDateTimeFull(analysis.finishedAt)}>
                  {formatDateTime(analysis.finishedAt)}
                </Table.Cell>
                <Table.Cell minW="52">{settingsWords(analysis.settings)}</Table.Cell>
                <Table.Cell fontFamily="mono" fontSize="13px">
                  {analysis.engineVersion ?? none}
                </Table.Cell>
                <Table.Cell whiteSpace="nowrap">{analysis.startedBy.name}</Table.Cell>
                <Table.Cell>
                  <Standing analysis={analysis} isLatest={analysis.id === latestId} />
                </Table.Cell>
                <Table.Cell textAlign="end">
                  {analysis.id === shownId ? (
                    <Text color="inkSoft">shown</Text>
                  ) : analysis.status === 'done' ? (
                    <Button size="xs" onClick={() => onShow(analysis.id)}>
                      View
                    </Button>
                  ) : null}
                </Table.Cell>
              </Table.Row>
            ))}
          </Table.Body>
        </Table.Root>
      </Box>
    </Section>
  );
}

function Standing({ analysis, isLatest }: { analysis: AnalysisHead; isLatest: boolean }) {
  const { status, problem } = analysis;
  if (status === 'failed') {
    return <Text title={problem?.message}>{problem?.code === 'cancelled' ? 'cancelled' : 'failed'}</Text>;
  }
  if (status !== 'done') return <Text>{status}</Text>;
  if (isLatest) return <Text fontWeight="600">latest</Text>;
  return <Text color="inkSoft">{analysis.supersededById ? 'superseded' : 'earlier'}</Text>;
}
