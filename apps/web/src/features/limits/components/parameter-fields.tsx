import { Input, InputGroup, SimpleGrid } from '@chakra-ui/react';
import { FormField } from '../../../components/form-field.js';
import { parameterWords, type ParameterKey } from '../../../components/verdict/verdict-words.js';
import type { AskedParameters } from '../judge-draft.js';

interface ParameterFieldsProps {
  asked: AskedParameters;
  entries: Partial<Record<ParameterKey, string>>;
  problems: Partial<Record<ParameterKey, string>>;
  onChange: (key: ParameterKey, text: string) => void;
}

/** One field for each value that the set or the rule asks for; those that may be left out stand last. */
export function ParameterFields({ asked, entries, problems, onChange }: ParameterFieldsProps) {
  const keys = [...asked.needed, ...asked.optional];
  if (keys.length === 0) return null;
  return (
    <SimpleGrid columns={{ base: 1, sm: 2 }} gap="4">
      {keys.map((key) => {
        const { label, unit, help } = parameterWords[key];
        return (
          <FormField
            key={key}
            label={unit ? `${label} in ${unit}` : label}
            optional={asked.optional.includes(key)}
            help={help}
            error={problems[key]}
          >
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
