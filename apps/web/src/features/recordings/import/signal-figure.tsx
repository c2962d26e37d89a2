import { Box, chakra, Text } from '@chakra-ui/react';
import type { PreviewSignal } from '@overtally/contracts';
import { useId, useMemo } from 'react';
import { SelectInput } from '../../../components/form-field.js';
import { Segmented } from '../../../components/segmented.js';
import { formatDuration, formatSi } from '../../../lib/format.js';
import { drawSignal, type SignalDrawing } from '../charts/signal-path.js';
import { PreviewFrame } from './preview-frame.js';

interface SignalFigureProps {
  signals: readonly PreviewSignal[];
  /** Column whose channel is shown, where there is one; else the first. */
  chosen: number | null;
  onChoose: (column: number) => void;
  /** True while another one is worked out. */
  isBusy: boolean;
}

/** Channels up to which they are chosen in a row; more stand in a list. */
const inRow = 4;

/** The first cycles of a channel as it would be read, with what tells at a glance whether its scaling is right. */
export function SignalFigure({ signals, chosen, onChoose, isBusy }: SignalFigureProps) {
  const signal = signals.find(({ column }) => column === chosen) ?? signals[0];
  if (!signal) return null;
  const choice = {
    value: String(signal.column),
    options: signals.map(({ column, name }) => ({ value: String(column), label: name })),
  };
  const longest = signals.reduce((length, { name }) => length + name.length, 0);
  return (
    <PreviewFrame
      title="The first cycles as they will be read"
      scrolls={false}
      tools={
        signals.length === 1 ? undefined : signals.length <= inRow && longest <= 60 ? (
          <Segmented label="Channel shown" {...choice} onChange={(column) => onChoose(Number(column))} />
        ) : (
          <SelectInput
            aria-label="Channel shown"
            width="180px"
            {...choice}
            onChange={(event) => onChoose(Number(event.target.value))}
          />
        )
      }
    >
      <Box px="3" pt="2" pb="2" aria-busy={isBusy} opacity={isBusy ? 0.6 : 1}>
        <Figures signal={signal} />
        <Drawing signal={signal} />
      </Box>
    </PreviewFrame>
  );
}

/** "230.2 V rms, 325.6 V peak, 49.98 Hz" */
function Figures({ signal }: { signal: PreviewSignal }) {
  const { rms, peak, unit, fundamentalHz, values, stepS } = signal;
  const found =
    fundamentalHz === null
      ? `no fundamental found in the first ${formatDuration(values.length * stepS)}`
      : formatSi(fundamentalHz, 'Hz');
  return (
    <Text role="status" fontSize="13px" mb="2">
      {rms === null ? 'No value in the beginning of the file' : null}
      {rms !== null ? (
        <>
          <Figure>{formatSi(rms, unit)}</Figure> rms, <Figure>{formatSi(peak, unit)}</Figure> peak,{' '}
          {fundamentalHz === null ? (
            <chakra.span color="near">{found}</chakra.span>
          ) : (
            <Figure>{found}</Figure>
          )}
        </>
      ) : null}
    </Text>
  );
}

const Figure = chakra('span', { base: { fontFamily: 'mono', fontWeight: '600' } });

function Drawing({ signal }: { signal: PreviewSignal }) {
  const id = useId();
  const drawing = useMemo(() => drawSignal(signal), [signal]);
  if (!drawing) return null;
  const { missing } = drawing;
  return (
    <Box pl="60px" pb="20px" position="relative">
      <Box position="relative" h={{ base: '110px', md: '130px' }}>
        <Marks drawing={drawing} />
        <chakra.svg
          role="img"
          aria-labelledby={`${id}-title ${id}-desc`}
          viewBox="0 0 1000 100"
          preserveAspectRatio="none"
          position="absolute"
          inset="0"
          w="full"
          h="full"
          overflow="visible"
        >
          <title id={`${id}-title`}>{`${signal.name} against time`}</title>
          <desc id={`${id}-desc`}>{describe(signal, drawing)}</desc>
          <chakra.path
            d={drawing.path}
            fill="none"
            stroke="ink"
            strokeWidth="1.5"
            strokeLinejoin="round"
            strokeLinecap="round"
            vectorEffect="non-scaling-stroke"
          />
        </chakra.svg>
      </Box>
      {missing > 0 ? (
        <Text fontSize="xs" color="near" mt="6" ml="-60px">
          {missing === 1 ? '1 value of these is missing.' : `${missing} values of these are missing.`}
        </Text>
      ) : null}
    </Box>
  );
}

/** Hairlines with their values, as text of the page: the drawing itself is stretched. */
function Marks({ drawing: { xMarks, yMarks, zeroAt } }: { drawing: SignalDrawing }) {
  return (
    <Box aria-hidden="true" fontSize="xs" color="inkSoft">
      {yMarks.map(({ at, text }) => (
        <Box
          key={text}
          position="absolute"
          top={`${at}%`}
          left="0"
          right="0"
          borderTopWidth="1px"
          borderColor="rule"
        >
          <Box as="span" position="absolute" right="100%" top="-0.7em" pr="2" whiteSpace="nowrap">
            {text}
          </Box>
        </Box>
      ))}
      {zeroAt === null ? null : (
        <Box
          position="absolute"
          top={`${zeroAt}%`}
          left="0"
          right="0"
          borderTopWidth="1px"
          borderColor="ruleStrong"
        />
      )}
      {xMarks.map(({ at, text }) => (
        <Box
          key={text}
          as="span"
          position="absolute"
          top="calc(100% + 3px)"
          left={`${at}%`}
          transform={at > 95 ? 'translateX(-100%)' : at < 5 ? undefined : 'translateX(-50%)'}
          whiteSpace="nowrap"
        >
          {text}
        </Box>
      ))}
    </Box>
  );
}

function describe({ values, stepS, unit, rms, peak, fundamentalHz }: PreviewSignal, drawing: SignalDrawing) {
  const shown = values.slice(0, drawing.count).filter((value): value is number => value !== null);
  const lowest = shown.reduce((a, b) => Math.min(a, b), Infinity);
  const highest = shown.reduce((a, b) => Math.max(a, b), -Infinity);
  return [
    `The first ${formatDuration(drawing.count * stepS)}, between ${formatSi(lowest, unit)} and ${formatSi(highest, unit)}.`,
    rms === null ? '' : `${formatSi(rms, unit)} rms, ${formatSi(peak, unit)} peak.`,
    fundamentalHz === null
      ? 'No fundamental was found.'
      : `The fundamental is ${formatSi(fundamentalHz, 'Hz')}.`,
  ]
    .filter(Boolean)
    .join(' ');
}
