import { Box, Button, Text } from '@chakra-ui/react';
import type { SupplyVerdict } from '@overtally/contracts';
import { useState } from 'react';
import { formatSi, none } from '../../lib/format.js';
import type { TableColumn } from '../table-column.js';
import { TableTwin } from '../table-twin.js';

type Check = SupplyVerdict['checks'][number];

const words: Record<Check['result'], string> = {
  pass: 'kept',
  fail: 'missed',
  'not-decidable': 'not measured',
};
const tones = { pass: 'within', fail: 'over', 'not-decidable': 'near' } as const;

/** Percentages to a hundredth of the strictest demand, 0.1 %. */
const measured = ({ value, unit }: Check): string =>
  value !== null && unit === '%' ? `${value.toFixed(3)} %` : formatSi(value, unit);

function allowed({ from, upTo, unit }: Check): string {
  const shown = (value: number) => formatSi(value, unit, { trim: true });
  if (from !== null && upTo !== null) return `${shown(from)} to ${shown(upTo)}`;
  return upTo === null ? none : `up to ${shown(upTo)}`;
}

const columns: TableColumn<Check>[] = [
  { key: 'name', header: 'Of the supply', fileHeader: 'Of the supply', value: (row) => row.name },
  {
    key: 'value',
    header: 'Measured',
    fileHeader: 'Measured',
    align: 'right',
    value: (row) => row.value,
    show: measured,
  },
  {
    key: 'allowed',
    header: 'Allowed',
    fileHeader: 'Allowed',
    align: 'right',
    value: (row) => allowed(row),
  },
  {
    key: 'result',
    header: 'Result',
    fileHeader: 'Result',
    value: (row) => words[row.result],
    tone: (row) => tones[row.result],
  },
];

/** The supply of a test against what the standard asks of it: one sentence, the numbers on request. */
export function SupplyView({ supply, fileName }: { supply: SupplyVerdict; fileName: string }) {
  const [open, setOpen] = useState(false);
  const { result, summary, assumption, checks, channelName, nominalV, frequencyHz } = supply;
  return (
    <Box as="section" aria-label="Test supply" borderTopWidth="1px" borderColor="rule" pt="2">
      <Text color={result === 'pass' ? undefined : 'near'} role={result === 'fail' ? 'note' : undefined}>
        <Text as="span" fontWeight="600">
          {result === 'fail' ? 'Caution, test supply. ' : 'Test supply. '}
        </Text>
        {summary}.
      </Text>
      <Text color="inkSoft" fontSize="13px">
        {channelName}, nominal {formatSi(nominalV, 'V', { trim: true })},{' '}
        {formatSi(frequencyHz, 'Hz', { trim: true })}.{assumption ? ` ${assumption}.` : ''} The result above
        is that of the currents as measured.
      </Text>
      <Button
        size="xs"
        variant="plain"
        color="act"
        px="0"
        aria-expanded={open}
        onClick={() => setOpen(!open)}
      >
        {open ? 'Hide the checks of the supply' : `Show the ${checks.length} checks of the supply`}
      </Button>
      {open ? (
        <TableTwin
          caption={`Test supply, ${channelName}`}
          columns={columns}
          rows={checks}
          rowKey={(row) => row.name}
          fileName={fileName}
          maxHeight="260px"
        />
      ) : null}
    </Box>
  );
}
