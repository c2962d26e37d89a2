import { Box, Flex, Text } from '@chakra-ui/react';
import type { ReportSection as Content } from '@overtally/contracts';
import { Section } from '../../../components/section.js';
import { TallyStrip } from '../../../components/tally-strip.js';
import { TitleBlock, type TitleCell } from '../../../components/title-block.js';
import { parameterLine } from '../../../components/verdict/parameter-line.js';
import { ResultWords } from '../../../components/verdict/result-words.js';
import { VerdictTables } from '../../../components/verdict/verdict-tables.js';
import { formatDateTime } from '../../../lib/format-date.js';
import { formatDuration, formatPercent, formatSha256, formatSi, none } from '../../../lib/format.js';
import { fundamentalWords } from '../../../lib/fundamental-words.js';
import { limitSetName } from '../../../lib/limit-set-name.js';
import { settingsWords, targetWords } from '../report-words.js';

/** One judged channel as the report shows it. */
export function ReportSection({ section, place }: { section: Content; place: number }) {
  const { verdict, recording, analysis, notes } = section;
  const set = limitSetName(verdict.limitSet);
  return (
    <Section title={`${place}. ${recording.number} ${recording.name}, channel ${verdict.channelName}`} mt="3">
      <TitleBlock label={`Section ${place}`} cells={titleCells(section)} />
      <Flex columnGap="6" rowGap="3" wrap="wrap" align="flex-start" justify="space-between" mb="2">
        <Box flex="1 1 320px" minW="0">
          <Text fontSize="md">
            <ResultWords result={verdict.result} />
            {verdict.reason ? <>. {verdict.reason}.</> : null}
          </Text>
          <Text color="inkSoft" fontSize="13px" maxW="80ch">
            {set}
            {verdict.limitSet.edition ? `, edition ${verdict.limitSet.edition}` : ''}.{' '}
            {verdict.decisionRuleText} {parameterLine(verdict.parameters)}
          </Text>
        </Box>
        <TallyStrip shares={verdict.orders} size="lg" />
      </Flex>
      <VerdictTables
        subject={`${recording.number}, ${verdict.channelName}, ${set}`}
        orders={verdict.orders}
        totals={verdict.totals}
        unit={verdict.unit}
        fileName={`${recording.number}-${verdict.channelName}`}
        maxHeight="360px"
      />
      <Notes notes={notes} />
      <Text color="inkSoft" fontSize="13px" mt="3" overflowWrap="anywhere">
        Judged by {verdict.author.name}, {formatDateTime(verdict.createdAt)}. Analysis of{' '}
        {formatDateTime(analysis.finishedAt)}, engine {analysis.engineVersion ?? none}:{' '}
        {settingsWords(analysis.settings)}. Source file {recording.file.name}, SHA-256{' '}
        <Box as="span" fontFamily="mono" fontSize="xs">
          {recording.file.sha256}
        </Box>
        .
      </Text>
    </Section>
  );
}

function titleCells({ recording, analysis: { channel } }: Content): TitleCell[] {
  return [
    { caption: 'EUT', value: recording.eut || 'not stated', grow: 2 },
    { caption: 'Captured', value: formatDateTime(recording.capturedAt) },
    { caption: 'Rate', value: formatSi(recording.sampleRateHz, 'Hz', { digits: 6, trim: true }), mono: true },
    { caption: 'Length', value: formatDuration(recording.durationS), mono: true },
    {
      caption: 'Fundamental',
      value: fundamentalWords(channel),
      mono: true,
      grow: 2.5,
    },
    { caption: 'rms', value: formatSi(channel.rms, channel.unit), mono: true },
    {
      caption: `THD, to ${channel.thdMaxOrder}`,
      value: formatPercent(channel.thdFPercent, 2),
      mono: true,
    },
    { caption: 'Measuring chain', value: recording.measuringChain || 'not stated', grow: 2 },
    { caption: 'Instrument', value: recording.instrument || 'not stated', grow: 2 },
    {
      caption: 'Source SHA-256',
      value: formatSha256(recording.file.sha256),
      title: recording.file.sha256,
      mono: true,
      grow: 1.5,
    },
  ];
}

function Notes({ notes }: Pick<Content, 'notes'>) {
  if (notes.length === 0) return null;
  return (
    <Box mt="3">
      <Text fontWeight="600">Notes</Text>
      {notes.map((note) => (
        <Box key={note.id} py="1.5" borderBottomWidth="1px" borderColor="rule">
          <Text>
            <Box as="span" fontWeight="600" mr="2">
              {targetWords(note.target)}
            </Box>
            {note.text}
            {note.cause ? ` Cause: ${note.cause}.` : ''}
          </Text>
          <Text fontSize="xs" color="inkSoft">
            {note.author.name}, {formatDateTime(note.updatedAt)}
          </Text>
        </Box>
      ))}
    </Box>
  );
}
