import { Box, Flex, Input, Text } from '@chakra-ui/react';
import { quantitySchema } from '@overtally/contracts';
import { FormField, SelectInput } from '../../../components/form-field.js';
import { physicalWords, quantityOptions } from '../quantity-words.js';
import { useDraftPart, useStudyStore } from '../study-store.js';

/** What stands behind the last stage; it follows from impedances and admittances, and can be said for other stages. */
export function OutputFields({ disabled }: { disabled: boolean }) {
  const store = useStudyStore();
  const inputQuantity = useDraftPart((draft) => draft.inputQuantity);
  const inputUnit = useDraftPart((draft) => draft.inputUnit);
  const quantity = useDraftPart((draft) => draft.outputQuantity);
  const unit = useDraftPart((draft) => draft.outputUnit);
  const isOther = quantity !== inputQuantity || unit !== inputUnit;
  return (
    <Box borderTopWidth="1px" borderColor="rule" py="3">
      <Flex gap="3">
        <FormField label="At the output stands">
          <SelectInput
            options={quantityOptions}
            value={quantity}
            disabled={disabled}
            onChange={(event) => {
              const outputQuantity = quantitySchema.parse(event.target.value);
              store.change((draft) => ({ ...draft, outputQuantity }));
            }}
          />
        </FormField>
        <Box w="20" flexShrink="0">
          <FormField label="Unit">
            <Input
              value={unit}
              maxLength={20}
              disabled={disabled}
              onChange={(event) => {
                const outputUnit = event.target.value;
                store.change((draft) => ({ ...draft, outputUnit }));
              }}
            />
          </FormField>
        </Box>
      </Flex>
      {isOther ? (
        <Text fontSize="xs" color="near" mt="1">
          {`Another quantity than at the input, ${physicalWords(inputQuantity, inputUnit)}: amounts before and behind cannot be compared with each other.`}
        </Text>
      ) : null}
    </Box>
  );
}
