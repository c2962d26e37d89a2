import { Box, Table, Text } from '@chakra-ui/react';
import type { ReadingRule } from '@overtally/contracts';
import { Sheet } from '../../../components/sheet.js';
import { formatDate, formatDateTimeFull } from '../../../lib/format-date.js';
import { formatCount } from '../../../lib/format.js';
import { optionsWords } from './options-words.js';
import { RuleActions } from './rule-actions.js';

interface RuleTableProps {
  projectId: string;
  rules: readonly ReadingRule[];
  mayWrite: boolean;
}

/** Each rule: which files it is for, what it sets, what was read by it, and who made it. */
export function RuleTable({ projectId, rules, mayWrite }: RuleTableProps) {
  return (
    <Sheet overflowX="auto">
      <Table.Root size="sm">
        <Table.Caption srOnly>Reading rules, the one that is tried first on top</Table.Caption>
        <Table.Header>
          <Table.Row>
            <Table.ColumnHeader scope="col">Rule</Table.ColumnHeader>
            <Table.ColumnHeader scope="col" hideBelow="md">
              Sets
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col" textAlign="end">
              Recordings
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col" hideBelow="lg">
              Made by
            </Table.ColumnHeader>
            {mayWrite ? (
              <Table.ColumnHeader scope="col">
                <Box srOnly>Change</Box>
              </Table.ColumnHeader>
            ) : null}
          </Table.Row>
        </Table.Header>
        <Table.Body>
          {rules.map((rule) => (
            <Table.Row key={rule.id} verticalAlign="top">
              <Table.Cell minW={{ md: '48' }}>
                <Text fontWeight="600">{rule.name}</Text>
                <Text fontFamily="mono" fontSize="13px" overflowWrap="anywhere">
                  {rule.fileNamePattern}
                </Text>
                <ColumnCondition names={rule.columnNames} />
                <Box hideFrom="md" mt="2">
                  <Settings rule={rule} />
                </Box>
              </Table.Cell>
              <Table.Cell hideBelow="md">
                <Settings rule={rule} />
              </Table.Cell>
              <Table.Cell textAlign="end" fontFamily="mono" fontSize="13px">
                {formatCount(rule.recordingCount)}
              </Table.Cell>
              <Table.Cell hideBelow="lg" color="inkSoft" whiteSpace="nowrap">
                {rule.createdBy.name}
                <Text fontSize="13px" title={formatDateTimeFull(rule.updatedAt)}>
                  {rule.updatedAt === rule.createdAt
                    ? formatDate(rule.createdAt)
                    : `changed ${formatDate(rule.updatedAt)}`}
                </Text>
              </Table.Cell>
              {mayWrite ? (
                <Table.Cell>
                  <RuleActions projectId={projectId} rule={rule} />
                </Table.Cell>
              ) : null}
            </Table.Row>
          ))}
        </Table.Body>
      </Table.Root>
    </Sheet>
  );
}

/** Columns that are named one by one; of more, their number. */
const namedColumns = 6;

function ColumnCondition({ names }: { names: ReadingRule['columnNames'] }) {
  if (!names) return null;
  const shown = names.slice(0, namedColumns).join(', ');
  const more = names.length > namedColumns ? ` and ${names.length - namedColumns} more` : '';
  return (
    <Text color="inkSoft" fontSize="13px" overflowWrap="anywhere" title={names.join(', ')}>
      with the columns {shown}
      {more}
    </Text>
  );
}

function Settings({ rule }: { rule: ReadingRule }) {
  return <OptionList words={optionsWords(rule.options)} />;
}

/** Settings shown one by one; of more, their number. */
const linesShown = 8;

/** Import options in words, one to a line. */
export function OptionList({ words }: { words: readonly string[] }) {
  if (words.length === 0) return <Text color="inkSoft">everything as found in the file</Text>;
  const more = words.length - linesShown;
  return (
    <Box as="ul" listStyleType="none" fontSize="13px">
      {words.slice(0, more > 1 ? linesShown : undefined).map((line) => (
        <li key={line}>{line}</li>
      ))}
      {more > 1 ? (
        <Text as="li" color="inkSoft" title={words.slice(linesShown).join('\n')}>
          and {more} more
        </Text>
      ) : null}
    </Box>
  );
}
