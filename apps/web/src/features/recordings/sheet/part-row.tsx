import { Flex } from '@chakra-ui/react';
import type { Analysis } from '@overtally/contracts';
import type { ReactNode } from 'react';
import { Segmented } from '../../../components/segmented.js';
import { ChannelChooser } from './channel-chooser.js';
import type { SheetPart } from './recording-sheet.js';

/** Whether any voltage of the analysis stands with a current. */
export const hasPower = ({ power, threePhase }: Pick<Analysis, 'power' | 'threePhase'>): boolean =>
  power.length > 0 || threePhase.length > 0;

interface PartRowProps {
  analysis: Analysis;
  channel: number;
  part: SheetPart;
  onPart: (part: SheetPart) => void;
  onChannel: (index: number) => void;
  /** At the right of the row. */
  actions: ReactNode;
}

const parts = [
  { value: 'channel', label: 'Channels' },
  { value: 'power', label: 'Power' },
] as const;

/** Row over the figures: a channel, or the power of the channels together. */
export function PartRow({ analysis, channel, part, onPart, onChannel, actions }: PartRowProps) {
  const choice = hasPower(analysis) ? (
    <Segmented label="Part of the sheet" value={part} options={parts} onChange={onPart} />
  ) : null;
  if (part === 'power') {
    return (
      <Flex justify="space-between" align="center" wrap="wrap" columnGap="6" rowGap="2" mb="3">
        {choice}
        <Flex gap="3">{actions}</Flex>
      </Flex>
    );
  }
  return (
    <ChannelChooser
      channels={analysis.channels}
      value={channel}
      onChange={onChannel}
      before={choice}
      actions={actions}
    />
  );
}
