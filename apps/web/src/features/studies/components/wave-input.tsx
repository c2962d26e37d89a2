import { Box, Stack } from '@chakra-ui/react';
import type { StudyInput } from '@overtally/contracts';
import { textbookSeries, type TextbookShape } from '@overtally/dsp';
import { FormField, SelectInput } from '../../../components/form-field.js';
import { NumberInput } from '../../../components/number-input.js';
import { withInput } from '../draft.js';
import { useDraftPart, useStudyStore } from '../study-store.js';
import { PhysicalFields } from './physical-fields.js';

type Wave = Extract<StudyInput, { kind: 'wave' }>;

const shapeWords: Record<TextbookShape, string> = {
  square: 'Square',
  sine: 'Sine',
  triangle: 'Triangle',
  sawtooth: 'Sawtooth',
  pulse: 'Pulse',
  'half-wave': 'Sine, half-wave rectified',
  'full-wave': 'Sine, full-wave rectified',
  'six-pulse': 'Line current of a six-pulse bridge',
};
const shapes = (Object.keys(shapeWords) as TextbookShape[]).map((value) => ({
  value,
  label: shapeWords[value],
}));

export const firstWave: Wave = {
  ...{ kind: 'wave', shape: 'six-pulse', amplitude: 10, frequencyHz: 50, maxOrder: 50 },
};

/** A wave whose harmonics follow from a closed form. */
export function WaveInput() {
  const store = useStudyStore();
  const input = useDraftPart((draft) => draft.input);
  const wave = input.kind === 'wave' ? input : firstWave;
  const set = (change: Partial<Wave>) => {
    const next = { ...wave, ...change };
    store.change((draft) => withInput(draft, { input: next, series: textbookSeries(next) }));
  };
  return (
    <Stack gap="3">
      <FormField label="Shape" help="Harmonics from its closed-form series">
        <SelectInput
          options={shapes}
          value={wave.shape}
          onChange={(event) => set({ shape: event.target.value as TextbookShape })}
        />
      </FormField>
      <Box display="grid" gridTemplateColumns="1fr 1fr" gap="3">
        <FormField label="Amplitude, peak">
          <NumberInput
            value={wave.amplitude}
            min={1e-12}
            max={1e12}
            onChange={(amplitude) => set({ amplitude })}
          />
        </FormField>
        <FormField label="Frequency in Hz">
          <NumberInput
            value={wave.frequencyHz}
            min={1e-3}
            max={1e9}
            onChange={(frequencyHz) => set({ frequencyHz })}
          />
        </FormField>
        <FormField label="Highest order">
          <NumberInput
            value={wave.maxOrder}
            min={1}
            max={1000}
            onChange={(maxOrder) => set({ maxOrder: Math.round(maxOrder) })}
          />
        </FormField>
        {wave.shape === 'pulse' ? (
          <FormField label="Duty in %">
            <NumberInput
              value={wave.dutyPercent ?? 50}
              min={0.01}
              max={99.99}
              onChange={(dutyPercent) => set({ dutyPercent })}
            />
          </FormField>
        ) : null}
      </Box>
      {input.kind === 'wave' ? <PhysicalFields /> : null}
    </Stack>
  );
}
