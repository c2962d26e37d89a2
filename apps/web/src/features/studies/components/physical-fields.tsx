import { Box, Flex, Input } from '@chakra-ui/react';
import { quantitySchema } from '@overtally/contracts';
import { FormField, SelectInput } from '../../../components/form-field.js';
import { withInput, type Physical } from '../draft.js';
import { quantityOptions } from '../quantity-words.js';
import { useDraftPart, useStudyStore } from '../study-store.js';

/** Quantity and unit of a signal that no recording names. */
export function PhysicalFields() {
  const store = useStudyStore();
  const quantity = useDraftPart((draft) => draft.inputQuantity);
  const unit = useDraftPart((draft) => draft.inputUnit);
  const set = (physical: Physical) =>
    store.change((draft) => withInput(draft, { input: draft.input, series: draft.series, physical }));
  return (
    <Flex gap="3">
      <FormField label="Quantity">
        <SelectInput
          options={quantityOptions}
          value={quantity}
          onChange={(event) => set({ quantity: quantitySchema.parse(event.target.value), unit })}
        />
      </FormField>
      <Box w="20" flexShrink="0">
        <FormField label="Unit">
          <Input
            value={unit}
            maxLength={20}
            onChange={(event) => set({ quantity, unit: event.target.value })}
          />
        </FormField>
      </Box>
    </Flex>
  );
}
