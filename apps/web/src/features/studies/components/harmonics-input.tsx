import { Box, Button, Stack, Textarea } from '@chakra-ui/react';
import { useMemo, useState } from 'react';
import { FormField } from '../../../components/form-field.js';
import { NumberInput } from '../../../components/number-input.js';
import { Segmented } from '../../../components/segmented.js';
import { withInput } from '../draft.js';
import { harmonicsText, readHarmonics } from '../input/harmonics-text.js';
import { useDraftPart, useStudyStore } from '../study-store.js';
import { PhysicalFields } from './physical-fields.js';

const amountOptions = [
  { value: 'rms', label: 'rms' },
  { value: 'percent', label: '% of order 1' },
] as const;

/** Harmonics typed or pasted, one order a line. */
export function HarmonicsInput() {
  const store = useStudyStore();
  const kind = useDraftPart((draft) => draft.input.kind);
  const held = store.draft().series;
  const [text, setText] = useState(() => harmonicsText(held));
  const [amounts, setAmounts] = useState<'rms' | 'percent'>('rms');
  const [frequencyHz, setFrequencyHz] = useState(held.frequencyHz);
  const [fundamentalRms, setFundamentalRms] = useState(
    held.components.find(({ order }) => order === 1)?.rms || 1,
  );
  const read = useMemo(
    () => readHarmonics({ text, amounts, frequencyHz, fundamentalRms }),
    [text, amounts, frequencyHz, fundamentalRms],
  );
  const { series } = read;
  return (
    <Stack gap="3">
      <Box display="grid" gridTemplateColumns="1fr 1fr" gap="3">
        <FormField label="Fundamental in Hz">
          <NumberInput value={frequencyHz} min={1e-3} max={1e9} onChange={setFrequencyHz} />
        </FormField>
        {amounts === 'percent' ? (
          <FormField label="rms of order 1">
            <NumberInput value={fundamentalRms} min={1e-12} max={1e12} onChange={setFundamentalRms} />
          </FormField>
        ) : null}
      </Box>
      <Segmented label="Amounts as" value={amounts} options={amountOptions} onChange={setAmounts} />
      <FormField
        label="Harmonics"
        help="Order, amount and, if known, phase in degrees (cosine form) on each line; order 0 is DC. Rows of a spreadsheet can be pasted."
        error={read.problem ?? undefined}
      >
        <Textarea
          rows={7}
          fontFamily="mono"
          value={text}
          spellCheck={false}
          onChange={(event) => setText(event.target.value)}
        />
      </FormField>
      <Button
        alignSelf="flex-start"
        disabled={series === null}
        onClick={() => {
          if (series === null) return;
          store.change((draft) => withInput(draft, { input: { kind: 'harmonics', series }, series }));
        }}
      >
        Take these harmonics
      </Button>
      {kind === 'harmonics' ? <PhysicalFields /> : null}
    </Stack>
  );
}
