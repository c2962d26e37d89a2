import { ChakraProvider } from '@chakra-ui/react';
import { QueryClientProvider } from '@tanstack/react-query';
import { render, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import type { Recording } from '@overtally/contracts';
import { findPublishedLimitSet } from '@overtally/limits';
import { describe, expect, it } from 'vitest';
import { queryClient } from '../../../lib/query-client.js';
import { system } from '../../../lib/theme/system.js';
import { json, mockApi, page } from '../../../testing/mock-api.js';
import { sampleChannel } from '../../../testing/sample-analyses.js';
import { sampleVerdict } from '../../../testing/sample-verdicts.js';
import { sampleId, sampleLimitSet, sampleRecording } from '../../../testing/samples.js';
import { JudgeDialog } from './judge-dialog.js';

const analysisId = sampleId(500);
const published = ['iec61000-3-2.classD', 'iec61000-3-12.table5'].map((id) => findPublishedLimitSet(id)!);
const summaries: Recording['summaries'] = [
  {
    ...{ channel: 0, name: 'i', quantity: 'current', unit: 'A' },
    ...{ fundamentalHz: 50, rms: 4, thdFPercent: 60, harmonicRms: [3, 0, 2.4] },
  },
];
const candidates = [
  sampleRecording({
    id: sampleId(148),
    number: 'R-0148',
    name: 'Second run',
    latestAnalysisId: sampleId(501),
    summaries,
  }),
  sampleRecording({ id: sampleId(149), number: 'R-0149', name: 'Not analysed', latestAnalysisId: null }),
];
const sets = [sampleLimitSet(), ...published];

function open() {
  const seen = mockApi({
    'GET /limit-sets': page(sets),
    [`POST /analyses/${analysisId}/verdicts`]: json(sampleVerdict(), 201),
  });
  render(
    <ChakraProvider value={system}>
      <QueryClientProvider client={queryClient}>
        <JudgeDialog
          open
          onClose={() => undefined}
          projectId={sampleId(10)}
          analysisId={analysisId}
          channels={[sampleChannel()]}
          subject="R-0147"
          repeatCandidates={candidates}
        />
      </QueryClientProvider>
    </ChakraProvider>,
  );
  return { seen, user: userEvent.setup() };
}

describe('judging a channel', () => {
  it('shows where it leads before anything is stored: 2.4 A against 2.3 A fails', async () => {
    const { seen, user } = open();
    expect(await screen.findByText(/^Preview of this recording, not stored/)).toBeTruthy();
    expect(screen.getByRole('status').textContent).toBe('Fail. Over at 3.');
    await user.click(screen.getByRole('button', { name: 'Store the verdict' }));
    expect(await screen.findByRole('dialog', { name: 'Verdict on R-0147' })).toBeTruthy();
    expect(seen.at(-1)?.body).toEqual({
      ...{ limitSetId: sampleId(30), channel: 0, parameters: {}, decisionRule: 'simple-acceptance' },
    });
  });

  // The contract of POST /analyses/:id/verdicts: repeats as analysis and channel.
  it('takes other recordings of the project as repeats of the test', async () => {
    const { seen, user } = open();
    await user.click(await screen.findByLabelText(/R-0148 Second run/));
    expect(screen.queryByLabelText(/R-0149/)).toBeNull();
    expect(screen.getByText(/and the repeat\.$/)).toBeTruthy();
    await user.click(screen.getByRole('button', { name: 'Store the verdict' }));
    await waitFor(() =>
      expect(seen.at(-1)?.body).toMatchObject({ repeats: [{ analysisId: sampleId(501), channel: 0 }] }),
    );
  });

  it('asks for what the set and the rule need, with units, before it can be stored', async () => {
    const { seen, user } = open();
    await user.selectOptions(await screen.findByLabelText('Limit set'), 'iec61000-3-2.classD');
    await user.selectOptions(screen.getByLabelText('Decision rule'), 'guarded-acceptance');
    const store = screen.getByRole<HTMLButtonElement>('button', { name: 'Store the verdict' });
    expect(store.disabled).toBe(true);
    const dialog = within(screen.getByRole('dialog'));
    await user.type(dialog.getByLabelText('Active power in W'), '-5');
    expect(await dialog.findByText('Must be above zero')).toBeTruthy();
    await user.clear(dialog.getByLabelText('Active power in W'));
    await user.type(dialog.getByLabelText('Active power in W'), '500');
    await user.type(dialog.getByLabelText(/Expanded uncertainty/), '2,5');
    await waitFor(() => expect(store.disabled).toBe(false));
    await user.click(store);
    await waitFor(() =>
      expect(seen.at(-1)?.body).toMatchObject({
        parameters: { powerW: 500, expandedUncertaintyPercent: 2.5 },
        decisionRule: 'guarded-acceptance',
      }),
    );
  });

  // IEC 61000-3-12, Table 5 chooses its row by Rsce, in percent of Iref; its numbers are of medium confidence.
  it('asks for what chooses the row, says what does not apply and how sure the values are', async () => {
    const { user } = open();
    await user.selectOptions(await screen.findByLabelText('Limit set'), 'iec61000-3-12.table5');
    expect(screen.getByText(/Confidence medium: check against the source/)).toBeTruthy();
    const dialog = within(screen.getByRole('dialog'));
    await user.type(dialog.getByLabelText('Short-circuit ratio Rsce'), '120');
    await user.type(dialog.getByLabelText('Reference current Iref in A'), '10');
    expect((await screen.findByRole('status')).textContent).toMatch(/^Not applicable. .* above 16 A up to/);
    await user.clear(dialog.getByLabelText('Reference current Iref in A'));
    await user.type(dialog.getByLabelText('Reference current Iref in A'), '20');
    await waitFor(() =>
      expect(screen.getByRole('status').textContent).toMatch(/interpolation between Rsce 33 and Rsce 250/),
    );
  });
});
