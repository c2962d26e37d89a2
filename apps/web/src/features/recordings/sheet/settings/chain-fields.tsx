import { Input, Stack, Table, Text } from '@chakra-ui/react';
import type { UseFormReturn } from 'react-hook-form';
import type { SettingsForm } from './settings-form.js';

/** What is known of the measuring chain of each channel, for the uncertainties. */
export function ChainFields({ form }: { form: UseFormReturn<SettingsForm> }) {
  const rows = form.watch('accuracy');
  const errors = form.formState.errors.accuracy;
  return (
    <Stack gap="2">
      <Text fontSize="13px" color="inkSoft">
        In percent of reading: the ± limits of the instrument, taken as a rectangular distribution, and the
        expanded uncertainty of its calibration, k = 2. Empty: not known.
      </Text>
      <Table.ScrollArea maxH="20rem">
        <Table.Root size="sm">
          <Table.Caption srOnly>Accuracy of the measuring chain by channel</Table.Caption>
          <Table.Header>
            <Table.Row>
              <Table.ColumnHeader scope="col">Channel</Table.ColumnHeader>
              <Table.ColumnHeader scope="col">Accuracy, ± %</Table.ColumnHeader>
              <Table.ColumnHeader scope="col">Calibration U, %</Table.ColumnHeader>
            </Table.Row>
          </Table.Header>
          <Table.Body>
            {rows.map(({ channel, name }, index) => {
              const problem =
                errors?.[index]?.readingPercent?.message ?? errors?.[index]?.calibrationPercent?.message;
              return (
                <Table.Row key={channel}>
                  <Table.Cell>
                    {name}
                    {problem ? (
                      <Text role="alert" color="over" fontSize="xs">
                        {problem}
                      </Text>
                    ) : null}
                  </Table.Cell>
                  {(['readingPercent', 'calibrationPercent'] as const).map((field) => (
                    <Table.Cell key={field} py="1">
                      <Input
                        size="xs"
                        w="24"
                        fontFamily="mono"
                        inputMode="decimal"
                        aria-label={
                          field === 'readingPercent'
                            ? `Accuracy of ${name} in percent of reading`
                            : `Expanded uncertainty of the calibration of ${name} in percent of reading`
                        }
                        aria-invalid={errors?.[index]?.[field] ? true : undefined}
                        {...form.register(`accuracy.${index}.${field}`)}
                      />
                    </Table.Cell>
                  ))}
                </Table.Row>
              );
            })}
          </Table.Body>
        </Table.Root>
      </Table.ScrollArea>
    </Stack>
  );
}
