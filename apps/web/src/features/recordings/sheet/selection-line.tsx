import { Button, CloseButton, Flex, Text } from '@chakra-ui/react';
import type { ChannelAnalysis } from '@overtally/contracts';
import { formatFixed } from '../../../lib/format.js';
import { formatToUncertainty, formatUncertainty } from '../../../lib/format-uncertainty.js';
import { resultWords, type OrderRow } from '../charts/order-rows.js';
import { fundamentalSymbol } from '../charts/words.js';
import { targetWords, type NoteTarget } from './note-target.js';
import { percentWords } from '../percent-words.js';

interface SelectionLineProps {
  channel: ChannelAnalysis;
  rows: readonly OrderRow[];
  target: NoteTarget;
  /** Leads to the order over time; absent where there are no windows. */
  onFollow?: (() => void) | undefined;
  /** Begins a note; absent for those who may not write. */
  onNote?: (() => void) | undefined;
  onClear: () => void;
}

/** What is selected in the spectrum, in figures, and what can be done with it. */
export function SelectionLine({ channel, rows, target, onFollow, onNote, onClear }: SelectionLineProps) {
  const row = target.kind === 'order' ? rows.find(({ order }) => order === target.order) : undefined;
  return (
    <Flex
      align="center"
      wrap="wrap"
      columnGap="3"
      rowGap="1"
      mt="2"
      py="1.5"
      borderTopWidth="1px"
      borderColor="rule"
      fontSize="13px"
    >
      <Text fontWeight="600">{targetWords(target)}</Text>
      <Text fontFamily="mono" minW="0">
        {row ? orderFigures(row, channel) : null}
      </Text>
      <Flex ml="auto" gap="1" align="center">
        {onFollow ? (
          <Button size="xs" variant="ghost" onClick={onFollow}>
            Over time
          </Button>
        ) : null}
        {onNote ? (
          <Button size="xs" variant="ghost" onClick={onNote}>
            Note on it
          </Button>
        ) : null}
        <CloseButton
          size="2xs"
          variant="ghost"
          colorPalette="gray"
          aria-label="Clear the selection"
          onClick={onClear}
        />
      </Flex>
    </Flex>
  );
}

function orderFigures(row: OrderRow, { unit, quantity }: ChannelAnalysis): string {
  const parts = [formatToUncertainty(row.rms, row.uncertainty, unit)];
  if (row.uncertainty !== null) parts[0] = `${parts[0]} ± ${formatUncertainty(row.uncertainty, unit)}`;
  if (row.order > 1 && row.percentOfFundamental !== null) {
    parts.push(`${percentWords(row.percentOfFundamental, 2)} of ${fundamentalSymbol(quantity)}`);
  }
  if (row.phaseDeg !== null) parts.push(`phase ${formatFixed(row.phaseDeg, 1, '°')}`);
  if (row.sharePercent !== null) parts.push(`${percentWords(row.sharePercent)} of its limit`);
  if (row.result !== null) parts.push(resultWords[row.result]);
  return parts.join(', ');
}
