import { Box, Table, Text } from '@chakra-ui/react';
import type { Verdict } from '@overtally/contracts';
import { ResultWords } from './result-words.js';

/** The repeats that a verdict is made of, each with its own result. */
export function RepeatsView({ repeats }: { repeats: Verdict['repeats'] }) {
  if (repeats.length === 0) return null;
  return (
    <Box as="section" aria-label="Repeats" borderTopWidth="1px" borderColor="rule" pt="2">
      <Text fontWeight="600">Repeats</Text>
      <Table.ScrollArea>
        <Table.Root size="sm" aria-label="Repeats">
          <Table.Header>
            <Table.Row>
              <Table.ColumnHeader scope="col">No.</Table.ColumnHeader>
              <Table.ColumnHeader scope="col">Recording</Table.ColumnHeader>
              <Table.ColumnHeader scope="col">Result</Table.ColumnHeader>
            </Table.Row>
          </Table.Header>
          <Table.Body>
            {repeats.map(({ analysisId, recordingNumber, result, reason }, index) => (
              <Table.Row key={analysisId} verticalAlign="top">
                <Table.Cell>{index + 1}</Table.Cell>
                <Table.Cell whiteSpace="nowrap">{recordingNumber}</Table.Cell>
                <Table.Cell whiteSpace="normal">
                  <ResultWords result={result} />
                  <Text color="inkSoft" fontSize="xs">
                    {reason}
                  </Text>
                </Table.Cell>
              </Table.Row>
            ))}
          </Table.Body>
        </Table.Root>
      </Table.ScrollArea>
    </Box>
  );
}
