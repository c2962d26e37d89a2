import { ChakraProvider } from '@chakra-ui/react';
import { render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { expect, it, vi } from 'vitest';
import { system } from '../lib/theme/system.js';
import { TableTwin } from './table-twin.js';
import { hiddenWords } from './use-hidden-rows.js';

interface Row {
  order: number;
  rms: number | null;
}
const rows: Row[] = [
  { order: 3, rms: 0.02 },
  { order: 5, rms: null },
  { order: 11, rms: 0.5 },
];

function show() {
  render(
    <ChakraProvider value={system}>
      <TableTwin
        caption="Current by order"
        fileName="orders"
        rows={rows}
        rowKey={(row) => row.order}
        detail={{
          label: 'Budget',
          name: (row) => `Budget of order ${row.order}`,
          of: (row) => (row.rms === null ? null : `made of ${row.rms}`),
        }}
        columns={[
          { key: 'order', header: 'Order', fileHeader: 'order', value: (row) => row.order },
          { key: 'rms', header: 'rms', fileHeader: 'rms (A)', align: 'right', value: (row) => row.rms },
        ]}
      />
    </ChakraProvider>,
  );
}

const orders = () =>
  screen
    .getAllByRole('row')
    .slice(1)
    .map((row) => within(row).getAllByRole('cell')[0]?.textContent);

it('sorts up and down, with what is absent last both ways', async () => {
  show();
  const user = userEvent.setup();
  await user.click(screen.getByRole('button', { name: 'rms' }));
  expect(orders()).toEqual(['3', '11', '5']);
  await user.click(screen.getByRole('button', { name: 'rms' }));
  expect(orders()).toEqual(['11', '3', '5']);
  expect(screen.getByRole('columnheader', { name: 'rms' }).getAttribute('aria-sort')).toBe('descending');
});

it('copies what is shown, in its order, with units in the heading', async () => {
  const user = userEvent.setup();
  show();
  const write = vi.spyOn(navigator.clipboard, 'writeText');
  await user.click(screen.getByRole('button', { name: 'Copy' }));
  expect(write).toHaveBeenCalledWith('order\trms (A)\n3\t0.02\n5\t\n11\t0.5');
});

it('opens what stands behind a row under it, where there is something', async () => {
  show();
  const user = userEvent.setup();
  expect(screen.queryByRole('button', { name: 'Budget of order 5' })).toBeNull();
  const button = screen.getByRole('button', { name: 'Budget of order 3' });
  await user.click(button);
  expect(button.getAttribute('aria-expanded')).toBe('true');
  expect(screen.getByText('made of 0.02')).toBeTruthy();
});

it('says how many rows there are, and how many are out of sight', () => {
  show();
  expect(screen.getByText('3 rows')).toBeTruthy();
  expect(hiddenWords({ rowsBelow: 36, columnsRight: true })).toBe(
    '36 more rows below, more columns to the right',
  );
  expect(hiddenWords({ rowsBelow: 0, columnsRight: false })).toBeNull();
});
