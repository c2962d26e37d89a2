import { noteSchema, type Analysis, type Note, type Recording } from '@overtally/contracts';
import { ChakraProvider } from '@chakra-ui/react';
import { QueryClientProvider } from '@tanstack/react-query';
import { cleanup, render, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it, vi } from 'vitest';
import { Toaster } from '../../../components/toaster.js';
import { queryClient } from '../../../lib/query-client.js';
import { system } from '../../../lib/theme/system.js';
import { json, mockApi, noContent, page } from '../../../testing/mock-api.js';
import {
  sampleAccount,
  sampleId,
  sampleLimitSet,
  sampleProject,
  sampleRecording,
} from '../../../testing/samples.js';
import { sampleAnalysis, sampleChannel } from '../../../testing/sample-analyses.js';
import { RecordingSheet } from './recording-sheet.js';

vi.mock('../../../components/plot.js', () => ({
  Plot: ({ label }: { label: string }) => <div role="figure" aria-label={label} />,
}));

const moment = '2026-11-26T13:20:00Z';
const person = { id: sampleId(1), name: 'Mara Lind' };
const recordingId = sampleId(147);
const analysisId = sampleId(500);

/** One channel of current, clipped. */
const clippedAnalysis = (change: Partial<Analysis> = {}): Analysis =>
  sampleAnalysis({
    channels: [
      sampleChannel({
        flags: [
          {
            ...{ code: 'clipped', severity: 'error', message: 'The waveform stays flat at its limit.' },
            evidence: null,
          },
        ],
      }),
    ],
    ...change,
  });

const sampleNote = (number: number, change: Partial<Note> = {}): Note =>
  noteSchema.parse({
    ...{ id: sampleId(number), analysisId, channel: 0, target: { kind: 'order', order: 3 } },
    ...{ text: 'Follows the firing angle', cause: '', author: person, createdAt: moment, updatedAt: moment },
    ...change,
  });

const waveform = {
  ...{ channel: 0, unit: 'A', kind: 'samples', fromS: 0, toS: 1, startS: 0, stepS: 0.5 },
  ...{ values: [0, 1], minimum: [], maximum: [] },
};

const rmsSeries = {
  ...{ channel: 0, figure: 'rms', order: null, unit: 'A', aggregation: 'window', intervalS: 0.2 },
  ...{ timeS: [0, 0.2, 0.4], value: [3.1, 3.2, 3.3], flagged: [false, true, false], thinned: false },
};

const answers = (analysis = clippedAnalysis(), notes: Note[] = []) => ({
  [`GET /recordings/${recordingId}/analyses`]: page([analysis]),
  [`GET /recordings/${recordingId}/waveform`]: json(waveform),
  [`GET /analyses/${analysisId}`]: json(analysis),
  [`GET /analyses/${analysisId}/notes`]: page(notes),
  [`GET /analyses/${analysisId}/series`]: json(rmsSeries),
});

const noop = () => undefined;

function show(recording: Recording, role: 'manager' | 'guest' = 'manager') {
  render(
    <ChakraProvider value={system}>
      <QueryClientProvider client={queryClient}>
        <RecordingSheet
          project={sampleProject({ role, comparisonLimitSetId: sampleId(30) })}
          account={sampleAccount()}
          recording={recording}
          limitSets={[sampleLimitSet()]}
          place={{
            analysisId: null,
            channel: null,
            part: 'channel',
            onAnalysis: noop,
            onChannel: noop,
            onPart: noop,
          }}
          slots={{}}
          onDeleted={() => undefined}
        />
        <Toaster />
      </QueryClientProvider>
    </ChakraProvider>,
  );
  return userEvent.setup();
}

describe('sheet of a recording', () => {
  it('shows the comparison in words, flags with their severity, and figures that apply', async () => {
    mockApi(answers());
    show(sampleRecording());
    expect(await screen.findByText('over at 3')).toBeTruthy();
    expect(screen.getByText('Waveform clipped')).toBeTruthy();
    expect(screen.getByText('error')).toBeTruthy();
    expect(screen.getByText('Crest factor')).toBeTruthy();
    expect(screen.queryByText('SINAD')).toBeNull();
  });

  it('says what failed, where, and what to do', () => {
    mockApi({ [`GET /recordings/${recordingId}/analyses`]: page([]) });
    const problem = { code: 'bad-cell', message: '“n/a” is no number', cure: 'Leave the row out.', line: 12 };
    show(sampleRecording({ status: 'failed', problem, channels: [], latestAnalysisId: null }));
    const alert = screen.getByRole('alert');
    expect(within(alert).getByText('This file was not read')).toBeTruthy();
    expect(within(alert).getByText('line 12')).toBeTruthy();
    expect(within(alert).getByText('Leave the row out.')).toBeTruthy();
    expect(within(alert).getByRole('button', { name: 'Read again with other settings' })).toBeTruthy();
  });

  it('shows how far an analysis is and calls it off', async () => {
    const running = sampleAnalysis({ status: 'running', progress: 0.4, channels: [] });
    const seen = mockApi({
      ...answers(running),
      [`POST /analyses/${analysisId}/cancel`]: json(running, 202),
      [`GET /recordings/${recordingId}`]: json(sampleRecording()),
    });
    const user = show(sampleRecording({ status: 'analysing', progress: 0.4, latestAnalysisId: null }));
    expect(screen.getByText('40%')).toBeTruthy();
    await user.click(await screen.findByRole('button', { name: 'Cancel' }));
    await waitFor(() => expect(seen.map(({ method }) => method)).toContain('POST'));
  });

  it('calls a reading off, and offers to read again afterwards', async () => {
    const reading = sampleRecording({
      status: 'reading',
      progress: 0.2,
      channels: [],
      latestAnalysisId: null,
    });
    const seen = mockApi({
      [`GET /recordings/${recordingId}/analyses`]: page([]),
      [`GET /recordings/${recordingId}`]: json(reading),
      [`POST /recordings/${recordingId}/cancel-reading`]: json(reading, 202),
    });
    const user = show(reading);
    await user.click(screen.getByRole('button', { name: `Cancel reading ${reading.number}` }));
    await waitFor(() => expect(seen.map(({ method }) => method)).toContain('POST'));
    cleanup();
    const problem = { code: 'reading-cancelled', message: 'Called off', cure: 'Read it again.' };
    show({ ...reading, status: 'failed', problem });
    expect(screen.getByText('Reading was cancelled')).toBeTruthy();
    expect(screen.getByRole('button', { name: 'Read again with other settings' })).toBeTruthy();
  });

  it('says by which rule and settings it was read, also once the rule is deleted', async () => {
    mockApi(answers());
    show(
      sampleRecording({
        readingRule: { id: null, name: 'Bench scope' },
        import: { decimal: ',', channels: [{ column: 1, probeRatio: 100 }] },
      }),
    );
    const read = within(await screen.findByRole('region', { name: 'Reading' }));
    expect(read.getByText('Bench scope')).toBeTruthy();
    expect(read.getByText('(deleted since)')).toBeTruthy();
    expect(read.getByText('decimal comma')).toBeTruthy();
    expect(read.getByText('column 2: probe 100 : 1')).toBeTruthy();
  });

  it('lets a guest read and change nothing', async () => {
    mockApi(answers(clippedAnalysis(), [sampleNote(1)]));
    const user = show(sampleRecording(), 'guest');
    expect(await screen.findByText('Follows the firing angle')).toBeTruthy();
    for (const name of ['Edit note a', 'Add a note', 'Analyse again', 'Note on this part']) {
      expect(screen.queryByRole('button', { name })).toBeNull();
    }
    await user.click(screen.getByRole('button', { name: 'More' }));
    expect(await screen.findByRole('menuitem', { name: /Download the source/ })).toBeTruthy();
    expect(screen.queryByRole('menuitem', { name: 'Delete' })).toBeNull();
  });
});

describe('figures that lead to each other', () => {
  it('follow a chosen order over time', async () => {
    const seen = mockApi(answers());
    const user = show(sampleRecording());
    const spectrum = within(await screen.findByRole('region', { name: 'i, current by order' }));
    await user.click(spectrum.getByRole('radio', { name: 'Table' }));
    await user.click(spectrum.getByRole('button', { name: '3' }));
    expect(await screen.findByRole('region', { name: 'i, order 3, group over time' })).toBeTruthy();
    expect(spectrum.getByText(/2\.400.A, 120\.00.% of I₁/)).toBeTruthy();
    await waitFor(() => expect(seen.some(({ path }) => path.includes('figure=group&order=3'))).toBe(true));
  });

  it('show the place of a flag in the waveform', async () => {
    const evidence = { count: 37, timesS: [0.5], value: 14, limit: 3, unit: 'samples' };
    const flag = { code: 'clipped', severity: 'error', message: 'Flat.', evidence } as const;
    const span = { fromS: 1, toS: 2 };
    const analysis = clippedAnalysis({
      settings: { profile: 'mains', nominalFrequencyHz: 50, span },
      channels: [sampleChannel({ flags: [flag] })],
    });
    const seen = mockApi(answers(analysis));
    const user = show(sampleRecording());
    expect(await screen.findByText('37 times, 14 samples against 3 samples')).toBeTruthy();
    // Half a second into a span that begins at 1 s; four cycles of 50 Hz around it.
    await user.click(screen.getByRole('button', { name: /Show 1\.500.s in the waveform/ }));
    await waitFor(() => expect(seen.some(({ path }) => path.includes('fromS=1.46&toS=1.54'))).toBe(true));
    expect(screen.getByText(/analysed from 1\.00.s to 2\.00.s/)).toBeTruthy();
  });
});

describe('notes in the margin', () => {
  it('are lettered in the order of writing and say what they speak of', async () => {
    const span = { kind: 'span', fromS: 0.5, toS: 0.75 } as const;
    mockApi(answers(clippedAnalysis(), [sampleNote(1), sampleNote(2, { target: span, text: 'A dip' })]));
    show(sampleRecording());
    expect(await screen.findByText(/Order 3, 104/)).toBeTruthy();
    expect(screen.getByText('a')).toBeTruthy();
    expect(screen.getByText('b')).toBeTruthy();
  });

  it('are written for an order chosen by keyboard', async () => {
    const seen = mockApi({
      ...answers(),
      [`POST /analyses/${analysisId}/notes`]: json(sampleNote(1), 201),
    });
    const user = show(sampleRecording());
    await user.click(await screen.findByRole('button', { name: 'Add a note' }));
    const form = within(screen.getByRole('form', { name: 'New note' }));
    await user.click(form.getByRole('button', { name: 'Add note' }));
    expect(form.getByText('Choose an order')).toBeTruthy();
    await user.selectOptions(form.getByLabelText('Order'), '3');
    await user.type(form.getByLabelText('Note'), 'Third');
    await user.click(form.getByRole('button', { name: 'Add note' }));
    await waitFor(() =>
      expect(seen.find(({ method }) => method === 'POST')?.body).toEqual({
        channel: 0,
        target: { kind: 'order', order: 3 },
        text: 'Third',
        cause: '',
      }),
    );
  });

  it('are deleted, and written back by undo', async () => {
    const seen = mockApi({
      ...answers(clippedAnalysis(), [sampleNote(1)]),
      [`DELETE /notes/${sampleId(1)}`]: noContent(),
      [`POST /analyses/${analysisId}/notes`]: json(sampleNote(2), 201),
    });
    const user = show(sampleRecording());
    await user.click(await screen.findByRole('button', { name: 'Delete note a' }));
    await user.click(await screen.findByRole('button', { name: 'Undo' }));
    await waitFor(() =>
      expect(seen.find(({ method }) => method === 'POST')?.body).toMatchObject({
        target: { kind: 'order', order: 3 },
        text: 'Follows the firing angle',
      }),
    );
  });
});
