import { Button, Checkbox, Flex, Grid, Heading, Input, Stack, Text } from '@chakra-ui/react';
import { useFieldArray, type UseFormReturn } from 'react-hook-form';
import { FormField } from '../../../components/form-field.js';
import type { EquipmentForm } from '../equipment-values.js';

/** Operating modes of equipment; one that recordings use can be retired, not taken out. */
export function ModeFields({ form }: { form: UseFormReturn<EquipmentForm> }) {
  const modes = useFieldArray({ control: form.control, name: 'modes', keyName: 'key' });
  const errors = form.formState.errors.modes;
  return (
    <Stack as="fieldset" gap="3">
      <Heading as="legend" fontSize="sm">
        Operating modes
      </Heading>
      {modes.fields.length === 0 ? (
        <Text color="inkSoft" fontSize="13px">
          How it is run while it is measured: full load, standby, dimmed to half.
        </Text>
      ) : null}
      {modes.fields.map((mode, at) => (
        <Grid key={mode.key} gap="3" templateColumns={{ base: '1fr', md: '2fr 3fr auto' }} alignItems="end">
          <FormField label={`Mode ${at + 1}`} error={errors?.[at]?.name?.message}>
            <Input autoComplete="off" {...form.register(`modes.${at}.name`)} />
          </FormField>
          <FormField label="Description" optional error={errors?.[at]?.description?.message}>
            <Input autoComplete="off" {...form.register(`modes.${at}.description`)} />
          </FormField>
          {mode.recordings > 0 ? (
            <Checkbox.Root size="sm" pb="2">
              <Checkbox.HiddenInput {...form.register(`modes.${at}.retired`)} />
              <Checkbox.Control borderColor="edge" />
              <Checkbox.Label fontWeight="400">Retired ({mode.recordings} recorded)</Checkbox.Label>
            </Checkbox.Root>
          ) : (
            <Button aria-label={`Take out mode ${at + 1}`} onClick={() => modes.remove(at)}>
              Take out
            </Button>
          )}
        </Grid>
      ))}
      <Flex>
        <Button
          onClick={() => modes.append({ name: '', description: '', retired: false, recordings: 0 })}
          disabled={modes.fields.length >= 50}
        >
          Add a mode
        </Button>
      </Flex>
    </Stack>
  );
}
