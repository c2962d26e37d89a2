import { Text } from '@chakra-ui/react';
import type { ChannelAnalysis, HarmonicFamily, Recording } from '@overtally/contracts';
import { useMemo } from 'react';
import { FoldingFigure } from '../../../../components/folding-figure.js';
import { TableTwin } from '../../../../components/table-twin.js';
import { formatHz } from '../../../../lib/format.js';
import { percentWords } from '../../percent-words.js';
import { FamilyGlyph } from '../family-legend.js';
import type { NoteTarget } from '../note-target.js';
import { lineColumns } from './line-columns.js';
import { orderRuns } from './order-runs.js';

interface LinesSectionProps {
  recording: Recording;
  channel: ChannelAnalysis;
  target: NoteTarget | null;
  onTarget: (target: NoteTarget) => void;
}

/** The largest lines of the spectrum and the harmonic series that they seem to make up. */
export function LinesSection({ recording, channel, target, onTarget }: LinesSectionProps) {
  const { lines, families, name } = channel;
  const columns = useMemo(() => lineColumns(channel), [channel]);
  if (lines.length === 0) return null;
  const alone = lines.filter(({ familyIndex }) => familyIndex === null).length;
  const selectedHz = target?.kind === 'line' ? target.frequencyHz : null;
  return (
    <FoldingFigure title="Largest lines" subtitle={seriesWords(lines.length, families.length, alone)}>
      {families.map((family, index) => (
        <Family key={family.fundamentalHz} family={family} index={index} />
      ))}
      <TableTwin
        caption={`Largest lines of ${name}`}
        columns={columns}
        rows={lines}
        rowKey={(row) => row.frequencyHz}
        fileName={`${recording.number}-${name}-lines`}
        isSelected={(row) => row.frequencyHz === selectedHz}
        onSelect={(row) => onTarget({ kind: 'line', frequencyHz: row.frequencyHz })}
        maxHeight="420px"
      />
    </FoldingFigure>
  );
}

function Family({ family, index }: { family: HarmonicFamily; index: number }) {
  const { fundamentalHz, orders, shareOfPower } = family;
  return (
    <Text fontSize="13px">
      <FamilyGlyph index={index} />
      Proposed series of {formatHz(fundamentalHz, 3)}: {orders.length === 1 ? 'order' : 'orders'}{' '}
      {orderRuns(orders)}, {shareWords(shareOfPower)} of the power of these lines
    </Text>
  );
}

/** "99.4 %"; a share that would read as all of it is not told in digits. */
function shareWords(share: number): string {
  if (share >= 0.9999) return 'almost all';
  return percentWords(100 * share, share > 0.99 ? 2 : 1);
}

function seriesWords(lines: number, families: number, alone: number): string {
  const parts = [lines === 1 ? '1 line' : `${lines} lines`];
  if (families > 0) parts.push(families === 1 ? '1 harmonic series' : `${families} harmonic series`);
  if (alone > 0) parts.push(`${alone} in none`);
  return parts.join(', ');
}
