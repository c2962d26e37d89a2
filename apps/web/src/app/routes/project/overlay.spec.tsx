import type { ChannelSummary } from '@overtally/contracts';
import { screen } from '@testing-library/react';
import { describe, expect, it, vi } from 'vitest';
import { json, mockApi, page, problem } from '../../../testing/mock-api.js';
import { renderRoute } from '../../../testing/render-route.js';
import {
  sampleAccount,
  sampleId,
  sampleLimitSet,
  sampleProject,
  sampleRecording,
} from '../../../testing/samples.js';

vi.mock('../../../components/plot.js', () => ({
  Plot: ({ label }: { label: string }) => <div role="figure" aria-label={label} />,
}));

const { id } = sampleProject();
const [dimmer, supply, gone] = [sampleId(147), sampleId(148), sampleId(149)];
const summary = (change: Partial<ChannelSummary>): ChannelSummary => ({
  ...{ channel: 0, name: 'i', quantity: 'current', unit: 'A', fundamentalHz: 50, rms: 2, thdFPercent: 120 },
  harmonicRms: [2, 0, 2.4],
  ...change,
});
const answers = {
  'GET /auth/me': json(sampleAccount()),
  [`GET /projects/${id}`]: json(sampleProject()),
  'GET /limit-sets': page([sampleLimitSet()]),
  [`GET /recordings/${dimmer}`]: json(sampleRecording({ summaries: [summary({})] })),
  [`GET /recordings/${supply}`]: json(
    sampleRecording({
      ...{ id: supply, number: 'R-0148', name: 'Supply check', latestAnalysisId: sampleId(501) },
      summaries: [summary({ name: 'u', quantity: 'voltage', unit: 'V' })],
    }),
  ),
  [`GET /recordings/${gone}`]: problem(404, { title: 'Not found', detail: 'There is no such recording' }),
};
const open = (query: string) => {
  mockApi(answers);
  return renderRoute(`/projects/${id}/overlay${query}`);
};

describe('overlay', () => {
  it('says what to do while it is empty', async () => {
    open('');
    expect(await screen.findByText('Nothing to compare yet')).toBeTruthy();
    expect(screen.getByRole('button', { name: 'Add channels' })).toBeTruthy();
  });

  it('draws what can be drawn and names what failed', async () => {
    open(`?r=${dimmer}:0,${gone}:0`);
    expect(await screen.findByRole('figure', { name: 'R-0147 by order' })).toBeTruthy();
    expect(await screen.findByText(/There is no such recording/)).toBeTruthy();
    expect(screen.getByRole('button', { name: 'Try again' })).toBeTruthy();
  });

  it('refuses mixed units with words and offers relative amplitudes', async () => {
    const { user } = open(`?r=${dimmer}:0,${supply}:0`);
    expect(await screen.findByText(/Amperes and volts can’t share an axis/)).toBeTruthy();
    await user.click(screen.getByRole('button', { name: 'Switch to relative' }));
    expect(await screen.findByRole('figure', { name: 'R-0147, R-0148 by order' })).toBeTruthy();
  });

  it('gives a removed channel back', async () => {
    const { user, router } = open(`?r=${dimmer}:0,${supply}:0&as=relative`);
    await user.click(await screen.findByRole('button', { name: 'Remove R-0147' }));
    expect(router.state.location.search).not.toContain(dimmer);
    await user.click(await screen.findByRole('button', { name: 'Undo' }));
    expect(decodeURIComponent(router.state.location.search)).toContain(`${dimmer}:0,${supply}:0`);
  });
});
