import type { Recording } from '@overtally/contracts';
import { findPublishedLimitSet } from '@overtally/limits';
import { screen, waitFor, within } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { json, mockApi, page, problem } from '../../../testing/mock-api.js';
import { renderRoute } from '../../../testing/render-route.js';
import { sampleAccount, sampleId, sampleProject, sampleRecording } from '../../../testing/samples.js';

const classA = findPublishedLimitSet('iec61000-3-2.classA');
const { id } = sampleProject();
const address = `/projects/${id}/recordings`;

const recording = (number: number, change: Partial<Recording>): Recording =>
  sampleRecording({
    id: sampleId(100 + number),
    number: `R-000${number}`,
    name: `Capture ${number}`,
    ...change,
  });

// IEC 61000-3-2, Table 1: order 3 of class A is limited to 2.30 A.
const over = recording(3, {
  summaries: [
    {
      channel: 0,
      name: 'I',
      quantity: 'current',
      unit: 'A',
      fundamentalHz: 50,
      rms: 5.6,
      thdFPercent: 50,
      harmonicRms: [5, 0, 2.5, ...Array.from({ length: 37 }, () => 0)],
    },
  ],
});
const reading = recording(2, { status: 'reading', progress: 0.4, sampleRateHz: null });
const failed = recording(1, {
  status: 'failed',
  sampleRateHz: null,
  problem: { code: 'empty-file', message: 'The file is empty.', cure: 'Send the capture again.' },
});

const answers = (role: 'technician' | 'guest', items: Recording[]) => ({
  'GET /auth/me': json(sampleAccount()),
  [`GET /projects/${id}`]: json(
    sampleProject({
      role,
      comparisonLimitSetId: 'iec61000-3-2.classA',
      counts: { recordings: items.length, members: 1, reports: 0 },
    }),
  ),
  [`GET /projects/${id}/recordings`]: page(items),
  'GET /limit-sets': page([classA]),
  [`GET /projects/${id}/uploads`]: page([]),
  [`GET /projects/${id}/upload-limits`]: json({ maxFileBytes: 1e9, quotaBytes: null, usedBytes: 0 }),
});

const row = async (name: string) => {
  const link = await screen.findByRole('link', { name });
  const found = link.closest('tr');
  if (!found) throw new Error(`${name} stands in no row`);
  return within(found);
};

describe('recordings', () => {
  it('says of each how far it is, how it stands, or why it could not be read', async () => {
    mockApi(answers('technician', [over, reading, failed]));
    renderRoute(address);
    expect((await row('Capture 3')).getAllByText('over at 3').length).toBeGreaterThan(0);
    expect((await row('Capture 2')).getAllByText('reading 40 %').length).toBeGreaterThan(0);
    expect((await row('Capture 1')).getAllByText('The file is empty.').length).toBeGreaterThan(0);
    expect(await screen.findByText('3 recordings, 1 over the limit, 1 with a problem')).toBeTruthy();
  });

  it('lets reading be called off, and says so afterwards', async () => {
    const cancelled = recording(2, {
      ...{ status: 'failed', sampleRateHz: null, channels: [] },
      problem: { code: 'reading-cancelled', message: 'Reading was cancelled.', cure: 'Read it again.' },
    });
    let now = reading;
    const seen = mockApi({
      ...answers('technician', []),
      [`GET /projects/${id}/recordings`]: (request) => page([now])(request),
      [`POST /recordings/${reading.id}/cancel-reading`]: (request) => {
        now = cancelled;
        return json(cancelled)(request);
      },
    });
    const { user } = renderRoute(address);
    const [cancel] = (await row('Capture 2')).getAllByRole('button', { name: 'Cancel reading R-0002' });
    await user.click(cancel!);
    await waitFor(async () =>
      expect((await row('Capture 2')).getAllByText('Reading was cancelled.').length).toBeGreaterThan(0),
    );
    expect(seen.filter(({ method }) => method === 'POST')).toHaveLength(1);
  });

  it('lets nobody call reading off who may not change recordings', async () => {
    mockApi(answers('guest', [reading]));
    renderRoute(address);
    await row('Capture 2');
    expect(screen.queryByRole('button', { name: 'Cancel reading R-0002' })).toBeNull();
  });

  it('lets only what is ready be chosen for an overlay, from two on', async () => {
    mockApi(answers('technician', [over, { ...over, id: sampleId(104), name: 'Capture 4' }, reading]));
    const { user, router } = renderRoute(address);
    expect((await row('Capture 2')).getByRole<HTMLInputElement>('checkbox').disabled).toBe(true);
    await user.click((await row('Capture 3')).getByRole('checkbox'));
    await user.click((await row('Capture 4')).getByRole('checkbox'));
    await user.click(screen.getByRole('button', { name: 'Overlay 2 recordings' }));
    await waitFor(() =>
      expect(decodeURIComponent(router.state.location.search)).toContain(`${over.id}:0,${sampleId(104)}:0`),
    );
  });

  it('tells a technician what to do first and shows a guest no way to upload', async () => {
    mockApi(answers('technician', []));
    renderRoute(address);
    expect(await screen.findByText('No recording yet')).toBeTruthy();
    expect(screen.getByRole('button', { name: 'Add recordings' })).toBeTruthy();
  });

  it('shows a guest the list without the way in', async () => {
    mockApi(answers('guest', [over]));
    renderRoute(address);
    expect(await screen.findByRole('link', { name: 'Capture 3' })).toBeTruthy();
    expect(screen.queryByRole('button', { name: 'Add recordings' })).toBeNull();
  });

  it('says why the list is not there and offers another try', async () => {
    mockApi({
      ...answers('guest', []),
      [`GET /projects/${id}/recordings`]: problem(503, { title: 'Not now', detail: 'The database rests.' }),
    });
    renderRoute(address);
    expect(await screen.findByText('The database rests.')).toBeTruthy();
    expect(screen.getByRole('button', { name: 'Try again' })).toBeTruthy();
  });
});
