import { Box, Button, Heading, Table, Text } from '@chakra-ui/react';
import { inSeries, routhTable, type RouthRow } from '@overtally/dsp';
import { useState } from 'react';
import { Sheet } from '../../../components/sheet.js';
import { formatSi, none, signed } from '../../../lib/format.js';
import type { ChainFacts } from '../predict.js';

/** Why stages have no steady state: the poles at fault, and the Routh-Hurwitz table on request. */
export function UnsteadyNotice({ facts }: { facts: ChainFacts }) {
  const { verdict, reason, offending } = facts.stability;
  const [open, setOpen] = useState(false);
  return (
    <Sheet role="alert" px="4" py="3" mb="4" borderLeftWidth="3px" borderLeftColor="over">
      <Heading as="h2" fontSize="md">
        {verdict === 'unstable' ? 'Unstable: no steady state' : 'On the edge of stability: no steady state'}
      </Heading>
      <Text mt="1">{reason}</Text>
      {offending.length > 0 ? (
        <Box as="ul" mt="1" pl="5" listStyleType="disc" fontFamily="mono" fontSize="13px">
          {offending.map(({ re, im, multiplicity }) => (
            <li key={`${re} ${im}`}>
              {`s = ${formatSi(re, '')} ${im < 0 ? '−' : '+'} j ${formatSi(Math.abs(im), '')} 1/s${multiplicity > 1 ? `, ${multiplicity} times` : ''}`}
            </li>
          ))}
        </Box>
      ) : null}
      <Text mt="2" color="inkSoft" fontSize="13px">
        {verdict === 'unstable'
          ? 'What starts it grows and never settles, so harmonics, distortion and a verdict behind the stages do not exist. Lower the loop gain, add damping, or switch the stage off.'
          : 'What starts it never dies away, so the output depends on how it began. Add damping or a load, or switch the stage off.'}
      </Text>
      <Button mt="2" size="xs" aria-expanded={open} onClick={() => setOpen(!open)}>
        {open ? 'Close the Routh table' : 'Open the Routh table'}
      </Button>
      {open ? <Routh facts={facts} /> : null}
    </Sheet>
  );
}

/** Coefficients span many decades. */
const coefficient = (value: number) =>
  value !== 0 && (Math.abs(value) < 1e-3 || Math.abs(value) >= 1e6)
    ? signed(value.toExponential(3))
    : formatSi(value, '');

const cellText = ({ value, epsilonPower }: RouthRow['elements'][number]) =>
  epsilonPower === 0
    ? coefficient(value)
    : `${coefficient(value)} ε${epsilonPower === 1 ? '' : `^${epsilonPower}`}`;

function Routh({ facts }: { facts: ChainFacts }) {
  const table = routhTable(inSeries(facts.chain).denominator);
  const width = table.rows.reduce((most, { elements }) => Math.max(most, elements.length), 0);
  return (
    <Box overflowX="auto" mt="2" tabIndex={0} role="region" aria-label="Routh-Hurwitz table">
      <Text fontSize="13px">
        {`${table.signChanges} changes of sign in the first column: as many poles with a positive real part.`}
        {table.hasZeroRow ? ' A row vanished: poles lie symmetrically about the origin.' : ''}
        {table.isConclusive ? '' : ' The count is not to be relied on here; the poles above decide.'}
      </Text>
      <Table.Root size="sm">
        <Table.Caption srOnly>Routh-Hurwitz table of the denominator of all stages</Table.Caption>
        <Table.Body>
          {table.rows.map(({ power, elements, special }) => (
            <Table.Row key={power}>
              <Table.ColumnHeader scope="row">{`s^${power}`}</Table.ColumnHeader>
              {Array.from({ length: width }, (_, i) => (
                <Table.Cell key={i} fontFamily="mono" textAlign="end">
                  {elements[i] ? cellText(elements[i]) : none}
                </Table.Cell>
              ))}
              <Table.Cell fontSize="xs" color="inkSoft">
                {special === 'zero-row'
                  ? 'was zero'
                  : special === 'zero-first-element'
                    ? 'head was zero'
                    : ''}
              </Table.Cell>
            </Table.Row>
          ))}
        </Table.Body>
      </Table.Root>
    </Box>
  );
}
