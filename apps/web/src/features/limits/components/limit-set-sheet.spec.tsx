import { ChakraProvider } from '@chakra-ui/react';
import { findPublishedLimitSet } from '@overtally/limits';
import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { system } from '../../../lib/theme/system.js';
import { LimitSetSheet } from './limit-set-sheet.js';

const show = (id: string) =>
  render(
    <ChakraProvider value={system}>
      <LimitSetSheet set={findPublishedLimitSet(id)!} />
    </ChakraProvider>,
  );

describe('sheet of a limit set', () => {
  // IEEE 519, Table 2: TDD 5 % below Isc/IL = 20, 20 % from 1000.
  it('shows one row at a time of a set whose limits depend on a parameter', async () => {
    show('ieee519-2022.table2');
    expect(screen.getByText(/TDD up to order 50: 5/)).toBeTruthy();
    await userEvent.setup().selectOptions(screen.getByLabelText('Row'), 'Isc/IL from 1000');
    expect(screen.getByText(/TDD up to order 50: 20/)).toBeTruthy();
    expect(screen.getByText('Short-circuit ratio Isc/IL, Demand current IL')).toBeTruthy();
  });

  it('says what evidence there is and where the set does not apply', () => {
    show('iec61000-3-2.classC.gt25W.ed5');
    expect(screen.getByText('From memory; no source was seen')).toBeTruthy();
    expect(screen.getByText('medium: check against the source')).toBeTruthy();
    expect(screen.getByText(/use the set for 25 W or less/)).toBeTruthy();
  });
});
