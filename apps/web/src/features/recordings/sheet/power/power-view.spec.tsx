import { ChakraProvider } from '@chakra-ui/react';
import { render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it, vi } from 'vitest';
import { system } from '../../../../lib/theme/system.js';
import {
  sampleAnalysis,
  sampleChannel,
  samplePair,
  sampleThreePhase,
} from '../../../../testing/sample-analyses.js';
import { sampleRecording } from '../../../../testing/samples.js';
import { circuitsOf } from './circuits.js';
import { PowerView } from './power-view.js';

vi.mock('../../../../components/plot.js', () => ({
  Plot: ({ label }: { label: string }) => <div role="figure" aria-label={label} />,
}));

const names = ['u1', 'u2', 'u3', 'i1', 'i2', 'i3'];
const channels = names.map((name, index) =>
  sampleChannel({
    ...{ index, name, quantity: name.startsWith('u') ? 'voltage' : 'current' },
    flags: index === 3 ? [{ code: 'clipped', severity: 'error', message: 'Flat.', evidence: null }] : [],
  }),
);
const analysis = sampleAnalysis({
  channels,
  power: [0, 1, 2].map((phase) => samplePair({ voltageChannel: phase, currentChannel: phase + 3 })),
  threePhase: [sampleThreePhase()],
});

function show(shown = analysis) {
  const onChannel = vi.fn();
  render(
    <ChakraProvider value={system}>
      <PowerView recording={sampleRecording()} analysis={shown} onChannel={onChannel} />
    </ChakraProvider>,
  );
  return { user: userEvent.setup(), onChannel };
}

/** Text of the cells of the row that begins with `caption`. */
const cellsOf = (table: HTMLElement, caption: string) => {
  const row = within(table).getByRole('rowheader', { name: caption }).closest('tr');
  return [...(row?.querySelectorAll('td') ?? [])].map((cell) =>
    [...cell.querySelectorAll('abbr, span')].map((part) => part.textContent).join(''),
  );
};

describe('power', () => {
  it('is offered by set of three phases and by pair', () => {
    expect(circuitsOf(analysis).map(({ name }) => name)).toEqual([
      'u1, u2, u3 with i1, i2, i3',
      ...['u1 with i1', 'u2 with i2', 'u3 with i3'],
    ]);
  });

  it('groups the quantities of a pair as IEEE 1459 does, each under its symbol', async () => {
    const { user } = show();
    await user.click(screen.getByRole('radio', { name: 'u1 with i1' }));
    const table = screen.getByRole('table', { name: 'Power of u1 with i1, grouped as in IEEE 1459' });
    expect(cellsOf(table, 'Active')).toEqual(['P2.000\u00a0kW', 'P12.010\u00a0kW', 'PH\u221210.00\u00a0W']);
    expect(cellsOf(table, 'Ratios')).toEqual(['PF0.8696', 'PF10.8917', 'SN/S120.45\u00a0%']);
    // A figure that does not apply is a dash.
    expect(cellsOf(table, 'Nonactive')[2]).toContain('DH–');
    expect(screen.getByRole('figure', { name: /order 5 from the load/ })).toBeTruthy();
    expect(screen.getByText(/needs the rated current/)).toBeTruthy();
  });

  it('shows three phases together, each phase, and the symmetrical components', async () => {
    const { user } = show();
    const table = screen.getByRole('table', { name: /^Effective quantities/ });
    expect(cellsOf(table, 'Apparent')[0]).toBe('Se6.900\u00a0kVA');
    expect(screen.getByRole('columnheader', { name: 'Phase 2, u2 with i2' })).toBeTruthy();
    await user.click(screen.getByRole('radio', { name: 'Voltages' }));
    expect(screen.getByRole('figure', { name: /components of the voltages/ })).toBeTruthy();
    expect(screen.getByText(/largest 660.0.mA at order 3/)).toBeTruthy();
  });

  it('says which channel behind it is faulty and leads there', async () => {
    const { user, onChannel } = show();
    expect(screen.getByText(/i1: Waveform clipped/)).toBeTruthy();
    await user.click(screen.getByRole('button', { name: 'See i1' }));
    expect(onChannel).toHaveBeenCalledWith(3);
  });
});
