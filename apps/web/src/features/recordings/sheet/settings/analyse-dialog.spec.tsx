import { ChakraProvider } from '@chakra-ui/react';
import { QueryClientProvider } from '@tanstack/react-query';
import { render, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { queryClient } from '../../../../lib/query-client.js';
import { system } from '../../../../lib/theme/system.js';
import { json, mockApi } from '../../../../testing/mock-api.js';
import { sampleAnalysis } from '../../../../testing/sample-analyses.js';
import { sampleRecording } from '../../../../testing/samples.js';
import { AnalyseDialog } from './analyse-dialog.js';

const recording = sampleRecording({
  channels: [
    { index: 0, name: 'u', quantity: 'voltage', unit: 'V', gain: 1, offset: 0, chain: null },
    { index: 1, name: 'i', quantity: 'current', unit: 'A', gain: 1, offset: 0, chain: null },
  ],
});

function show() {
  const seen = mockApi({
    [`POST /recordings/${recording.id}/analyses`]: json(sampleAnalysis({ status: 'queued' }), 202),
  });
  render(
    <ChakraProvider value={system}>
      <QueryClientProvider client={queryClient}>
        <AnalyseDialog
          recording={recording}
          settings={{ profile: 'mains', nominalFrequencyHz: 'auto' }}
          view={{ fromS: 0, toS: 0.08 }}
          open
          onClose={() => undefined}
        />
      </QueryClientProvider>
    </ChakraProvider>,
  );
  return { seen, user: userEvent.setup(), dialog: within(screen.getByRole('dialog')) };
}

describe('settings of another analysis', () => {
  it('propose who belongs to whom, and send what is stated of the measuring chain', async () => {
    const { seen, user, dialog } = show();
    await user.click(dialog.getByRole('button', { name: /Power.*u with i/ }));
    await user.type(dialog.getByLabelText(/^Rated current/), '16');
    await user.click(dialog.getByRole('button', { name: /Measuring chain/ }));
    await user.type(dialog.getByLabelText('Accuracy of i in percent of reading'), '0,5');
    await user.click(dialog.getByRole('button', { name: 'Start analysis' }));
    await waitFor(() => expect(seen).toHaveLength(1));
    expect(seen[0]?.body).toEqual({
      settings: {
        ...{ profile: 'mains', nominalFrequencyHz: 'auto', ratedCurrentA: 16 },
        accuracy: [{ channel: 1, readingPercent: 0.5, calibrationPercent: 0 }],
      },
    });
  });

  it('show what a profile uses, and open a part in which something is wrong', async () => {
    const { seen, user, dialog } = show();
    expect(dialog.getByLabelText(/^Cycles per window/)).toBeTruthy();
    await user.selectOptions(dialog.getByLabelText('Profile'), 'tone');
    expect(dialog.getByLabelText(/^THD\+N in a band from/)).toBeTruthy();
    expect(dialog.getByText('10 when empty.')).toBeTruthy();
    expect(dialog.queryByRole('button', { name: /Power/ })).toBeNull();
    await user.selectOptions(dialog.getByLabelText('Profile'), 'general');
    const part = dialog.getByRole('button', { name: /Spectrum/ });
    await user.click(part);
    await user.type(dialog.getByLabelText(/^Overlap/), '99');
    await user.click(part);
    await user.click(dialog.getByRole('button', { name: 'Start analysis' }));
    expect(await dialog.findByText('Give percent from 0 to 95')).toBeTruthy();
    expect(part.getAttribute('aria-expanded')).toBe('true');
    expect(seen).toEqual([]);
  });
});
