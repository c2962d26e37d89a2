import { Text } from '@chakra-ui/react';
import { useState, type ReactNode } from 'react';
import { Segmented } from '../../../components/segmented.js';
import { formatSi } from '../../../lib/format.js';
import type { StudyDraft } from '../draft.js';
import { physicalWords } from '../quantity-words.js';
import { useDraftPart } from '../study-store.js';
import { HarmonicsInput } from './harmonics-input.js';
import { WaveInput } from './wave-input.js';

type Kind = StudyDraft['input']['kind'];

const kinds: readonly { value: Kind; label: string }[] = [
  { value: 'channel', label: 'Recording' },
  { value: 'wave', label: 'Textbook wave' },
  { value: 'harmonics', label: 'Typed' },
];

interface InputPartProps {
  disabled: boolean;
  /** Choice of a recording and its channel. */
  channelInput: ReactNode;
  /** The recording that the harmonics come from, in words. */
  source: ReactNode;
}

/** Where the harmonics come from. */
export function InputPart({ disabled, channelInput, source }: InputPartProps) {
  const held = useDraftPart((draft) => draft.input.kind);
  const [kind, setKind] = useState<Kind>(held);
  return (
    <>
      {disabled ? null : <Segmented label="Input from" value={kind} options={kinds} onChange={setKind} />}
      <InputLine source={source} />
      {disabled ? null : kind === 'channel' ? (
        channelInput
      ) : kind === 'wave' ? (
        <WaveInput />
      ) : (
        <HarmonicsInput />
      )}
    </>
  );
}

/** What the study starts from now. */
function InputLine({ source }: { source: ReactNode }) {
  const input = useDraftPart((draft) => draft.input);
  const series = useDraftPart((draft) => draft.series);
  const quantity = useDraftPart((draft) => draft.inputQuantity);
  const unit = useDraftPart((draft) => draft.inputUnit);
  const held = series.components.filter(({ rms }) => rms > 0);
  const last = held.reduce((most, { order }) => Math.max(most, order), 0);
  const counted = held.length === 1 ? '1 order' : `${held.length} orders up to ${last}`;
  return (
    <Text fontSize="13px" my="2">
      {input.kind === 'channel' ? source : null}
      {`${capital(physicalWords(quantity, unit))}, ${counted} of ${formatSi(series.frequencyHz, 'Hz', { digits: 6, trim: true })}. `}
      {input.kind === 'channel'
        ? 'Taken of each order is the rms of its single line with its phase; groups, smoothing and what lies between the orders stay out.'
        : null}
    </Text>
  );
}

const capital = (text: string) => text.charAt(0).toUpperCase() + text.slice(1);
