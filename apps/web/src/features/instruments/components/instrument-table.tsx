import { Link, Table, Text } from '@chakra-ui/react';
import type { Instrument } from '@overtally/contracts';
import { Link as RouterLink } from 'react-router-dom';
import { CalibrationMark } from '../../../components/calibration-mark.js';
import { Sheet } from '../../../components/sheet.js';
import { standingOf } from '../../../lib/calibration-words.js';
import { dueWords, identityWords, kindWords } from '../instrument-words.js';

interface InstrumentTableProps {
  instruments: readonly Instrument[];
  instrumentTo: (instrumentId: string) => string;
  now: Date;
}

/** Instruments with how their calibration stands. */
export function InstrumentTable({ instruments, instrumentTo, now }: InstrumentTableProps) {
  return (
    <Sheet overflowX="auto">
      <Table.Root size="md" aria-label="Instruments">
        <Table.Header>
          <Table.Row>
            <Table.ColumnHeader scope="col">Instrument</Table.ColumnHeader>
            <Table.ColumnHeader scope="col" hideBelow="md" w="20%">
              Kind
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col" w={{ base: '45%', md: '30%' }}>
              Calibration
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col" hideBelow="lg" w="16%">
              Looked after by
            </Table.ColumnHeader>
          </Table.Row>
        </Table.Header>
        <Table.Body>
          {instruments.map((instrument) => (
            <Table.Row key={instrument.id}>
              <Table.Cell>
                <Link asChild fontWeight="600">
                  <RouterLink to={instrumentTo(instrument.id)}>{instrument.name}</RouterLink>
                </Link>
                {instrument.retiredAt ? ' (retired)' : ''}
                <Text color="inkSoft" fontSize="13px" overflowWrap="anywhere">
                  {identityWords(instrument)}
                </Text>
              </Table.Cell>
              <Table.Cell hideBelow="md">{kindWords[instrument.kind]}</Table.Cell>
              <Table.Cell>
                <CalibrationMark standing={standingOf(instrument, now)} />
                <Text color="inkSoft" fontSize="13px">
                  {dueWords(instrument)}
                </Text>
              </Table.Cell>
              <Table.Cell hideBelow="lg" color="inkSoft">
                {instrument.responsible?.name ?? 'Administrators'}
              </Table.Cell>
            </Table.Row>
          ))}
        </Table.Body>
      </Table.Root>
    </Sheet>
  );
}
