import { Box, Flex } from '@chakra-ui/react';
import type { ChannelAnalysis, LimitSet, Recording } from '@overtally/contracts';
import { TallyStrip } from '../../../components/tally-strip.js';
import { TitleBlock, type TitleCell } from '../../../components/title-block.js';
import {
  formatDuration,
  formatHz,
  formatSha256,
  formatSi,
  formatWithUncertainty,
  none,
} from '../../../lib/format.js';
import { formatDateTime, formatDateTimeFull } from '../../../lib/format-date.js';
import type { ChannelComparison } from '../charts/order-rows.js';
import { CopyButton } from './copy-button.js';

interface SheetTitleBlockProps {
  recording: Recording;
  channel: ChannelAnalysis | null;
  set: LimitSet | null;
  comparison: ChannelComparison | null;
}

/** Cells over the figures, as on an engineering drawing. */
export function SheetTitleBlock({ recording, channel, set, comparison }: SheetTitleBlockProps) {
  const { file } = recording;
  const cells: TitleCell[] = [
    { caption: 'Number', value: recording.number, mono: true, grow: 0.7 },
    { caption: 'EUT', value: recording.eut || none, grow: 1.6 },
    {
      caption: 'Captured',
      value: formatDateTime(recording.capturedAt),
      title: formatDateTimeFull(recording.capturedAt),
      grow: 1.2,
    },
    { caption: 'Rate', value: formatSi(recording.sampleRateHz, 'Hz', { digits: 6, trim: true }), mono: true },
    { caption: 'Length', value: formatDuration(recording.durationS), mono: true, grow: 0.8 },
    { caption: 'Fundamental', value: fundamentalWords(channel), mono: true, grow: 1.5 },
    { caption: 'Measuring chain', value: recording.measuringChain || none, grow: 1.4 },
    {
      caption: 'Source SHA-256',
      value: (
        <Flex as="span" align="baseline" columnGap="1" wrap="wrap">
          {formatSha256(file.sha256)}
          <CopyButton text={file.sha256} label="SHA-256" />
        </Flex>
      ),
      mono: true,
      title: file.sha256,
      grow: 1.8,
    },
  ];
  if (set && comparison) cells.push(comparisonCell(set, comparison));
  return <TitleBlock label={`Title block of ${recording.number}`} cells={cells} />;
}

/** The engine gives one standard deviation; twice that is the expanded uncertainty (JCGM 100:2008, 6.2). */
const coverage = 2;

export function fundamentalWords(channel: ChannelAnalysis | null): string {
  const fundamental = channel?.fundamental;
  if (!fundamental) return none;
  const { frequencyHz, frequencyUncertaintyHz } = fundamental;
  if (frequencyUncertaintyHz === null) return formatHz(frequencyHz);
  const expanded = coverage * frequencyUncertaintyHz;
  // Beyond a millionth of the value the clock of the recorder rules, which the record cannot tell.
  if (expanded < frequencyHz * 1e-6) return formatHz(frequencyHz, 4);
  return formatWithUncertainty(frequencyHz, expanded, 'Hz');
}

function comparisonCell(set: LimitSet, { rows, words, tone }: ChannelComparison): TitleCell {
  const shares = rows.map(({ order, sharePercent }) => ({ order, sharePercent }));
  const judged = shares.some(({ sharePercent }) => sharePercent !== null);
  return {
    caption: [set.title, set.edition].filter(Boolean).join(', '),
    grow: 2.1,
    ...(tone ? { tone } : {}),
    value: (
      <>
        {judged ? (
          <Box mb="0.5">
            <TallyStrip shares={shares} label={`Share of the limit by order: ${words}`} />
          </Box>
        ) : null}
        {words}
      </>
    ),
  };
}
