import { Box, Textarea } from '@chakra-ui/react';
import { FormField } from '../../../components/form-field.js';
import { NumberInput } from '../../../components/number-input.js';
import { useDraftPart, useStudyStore } from '../study-store.js';

/** What the prediction rests on, and how its figures count. */
export function AssumptionsPart({ disabled }: { disabled: boolean }) {
  const store = useStudyStore();
  const assumptions = useDraftPart((draft) => draft.assumptions);
  const thdMaxOrder = useDraftPart((draft) => draft.thdMaxOrder);
  const resonance = useDraftPart((draft) => draft.resonance);
  const setResonance = (change: Partial<typeof resonance>) =>
    store.change((draft) => ({ ...draft, resonance: { ...draft.resonance, ...change } }));
  return (
    <>
      <FormField label="Assumptions" optional help="Stand with the prediction in a report">
        <Textarea
          rows={3}
          maxLength={4000}
          value={assumptions}
          disabled={disabled}
          onChange={({ target: { value } }) => store.change((draft) => ({ ...draft, assumptions: value }))}
        />
      </FormField>
      <Box display="grid" gridTemplateColumns="1fr 1fr" gap="3" mt="3">
        <FormField label="THD to order">
          <NumberInput
            value={thdMaxOrder}
            min={2}
            max={1000}
            disabled={disabled}
            onChange={(value) => store.change((draft) => ({ ...draft, thdMaxOrder: Math.round(value) }))}
          />
        </FormField>
        <FormField label="Peak counts from gain">
          <NumberInput
            value={resonance.minGain}
            min={0.01}
            max={1000}
            disabled={disabled}
            onChange={(minGain) => setResonance({ minGain })}
          />
        </FormField>
        <FormField label="Order is near within %">
          <NumberInput
            value={resonance.bandPercent}
            min={0.1}
            max={50}
            disabled={disabled}
            onChange={(bandPercent) => setResonance({ bandPercent })}
          />
        </FormField>
      </Box>
    </>
  );
}
