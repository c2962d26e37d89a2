import { Box, Flex } from '@chakra-ui/react';
import type { ChannelAnalysis, LimitSet, Recording } from '@overtally/contracts';
import { CalibrationMark } from '../../../components/calibration-mark.js';
import { TallyStrip } from '../../../components/tally-strip.js';
import { TitleBlock, type TitleCell } from '../../../components/title-block.js';
import { conditionsWords } from '../../../lib/conditions-words.js';
import { formatDuration, formatSha256, formatSi, none } from '../../../lib/format.js';
import { fundamentalWords } from '../../../lib/fundamental-words.js';
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
    { caption: 'Number', value: recording.number, mono: true, grow: 0.65 },
    { caption: 'EUT', value: recording.eut || none, grow: 1.5 },
    ...(recording.operatingMode
      ? [{ caption: 'Operating mode', value: recording.operatingMode.name, grow: 1.1 }]
      : []),
    {
      caption: 'Captured',
      value: formatDateTime(recording.capturedAt),
      title: formatDateTimeFull(recording.capturedAt),
      grow: 1.1,
    },
    {
      caption: 'Rate',
      value: formatSi(recording.sampleRateHz, 'Hz', { digits: 6, trim: true }),
      mono: true,
      grow: 0.85,
    },
    { caption: 'Length', value: formatDuration(recording.durationS), mono: true, grow: 0.75 },
    { caption: 'Fundamental', value: fundamentalWords(channel), mono: true, grow: 1.9 },
    chainCell(recording),
    ...conditionsCell(recording),
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
      grow: 1.6,
    },
  ];
  if (set && comparison) cells.push(comparisonCell(set, comparison));
  return <TitleBlock label={`Title block of ${recording.number}`} cells={cells} />;
}

/** The chain with its calibration on the day of the capture, and the channels that have one of their own. */
function chainCell({ chain, channels, measuringChain }: Recording): TitleCell {
  const own = channels.flatMap(({ name, chain: ofChannel }) =>
    ofChannel ? [{ name, chain: ofChannel }] : [],
  );
  if (!chain && own.length === 0) {
    return { caption: 'Measuring chain', value: measuringChain || none, grow: 1.7 };
  }
  const named = [...(chain ? [{ name: '', chain }] : []), ...own];
  return {
    caption: 'Measuring chain when captured',
    grow: 2.2,
    value: named.map(({ name, chain: each }) => (
      <Box key={name}>
        {name ? `${name}: ` : ''}
        {each.name} <CalibrationMark standing={each.calibrationState} />
      </Box>
    )),
  };
}

function conditionsCell({ conditions }: Recording): TitleCell[] {
  const words = conditionsWords(conditions);
  return words ? [{ caption: 'Conditions', value: words, grow: 1.9 }] : [];
}

function comparisonCell(set: LimitSet, { rows, words, tone }: ChannelComparison): TitleCell {
  // What the standard disregards is not judged, however much of its limit it uses.
  const shares = rows.map(({ order, sharePercent, result }) => ({
    order,
    sharePercent: result === 'disregarded' ? null : sharePercent,
  }));
  const judged = shares.some(({ sharePercent }) => sharePercent !== null);
  return {
    caption: set.title,
    title: [set.title, set.edition].filter(Boolean).join(', '),
    grow: 1.9,
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
