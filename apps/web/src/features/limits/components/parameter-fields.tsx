import { Input, InputGroup, SimpleGrid } from '@chakra-ui/react';
import { FormField } from '../../../components/form-field.js';
import { parameterWords, type ParameterKey } from '../../../components/verdict/verdict-words.js';

interface ParameterFieldsProps {
  needed: readonly ParameterKey[];
  entries: Partial<Record<ParameterKey, string>>;
  problems: Partial<Record<ParameterKey, string>>;
  onChange: (key: ParameterKey, text: string) => void;
}

/** One field for each value that the set or the rule asks for. */
export function ParameterFields({ needed, entries, problems, onChange }: ParameterFieldsProps) {
  if (needed.length === 0) return null;
  return (
    <SimpleGrid columns={{ base: 1, sm: 2 }} gap="4">
      {needed.map((key) => {
        const { label, unit, help } = parameterWords[key];
        return (
          <FormField key={key} label={unit ? `${label} in ${unit}` : label} help={help} error={problems[key]}>
            <InputGroup endElement={unit || undefined}>
              <Input
                inputMode="decimal"
                autoComplete="off"
                fontFamily="mono"
                value={entries[key] ?? ''}
                onChange={(event) => onChange(key, event.target.value)}
              />
            </InputGroup>
          </FormField>
        );
      })}
    </SimpleGrid>
  );
}
