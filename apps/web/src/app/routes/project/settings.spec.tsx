import { screen, waitFor } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { json, mockApi, page } from '../../../testing/mock-api.js';
import { renderRoute } from '../../../testing/render-route.js';
import { sampleAccount, sampleLimitSet, sampleProject } from '../../../testing/samples.js';

const project = sampleProject({
  defaultSettings: { profile: 'mains', nominalFrequencyHz: 'auto', maxOrder: 40 },
});
const set = sampleLimitSet();

const open = () => {
  const seen = mockApi({
    'GET /auth/me': json(sampleAccount()),
    [`GET /projects/${project.id}`]: json(project),
    [`PATCH /projects/${project.id}`]: json(project),
    'GET /limit-sets': page([set]),
    'GET /projects': page([project]),
  });
  return { seen, ...renderRoute(`/projects/${project.id}/settings`) };
};

describe('settings of a project', () => {
  it('sends another nominal frequency as a number and keeps settings it does not show', async () => {
    const { seen, user } = open();
    await user.selectOptions(await screen.findByLabelText('Nominal frequency'), 'other');
    await user.type(screen.getByLabelText('Frequency in Hz'), '16,7');
    await user.selectOptions(screen.getByLabelText('Lists compare with'), set.id);
    await user.click(screen.getByRole('button', { name: 'Save project' }));
    await waitFor(() =>
      expect(seen.find((request) => request.method === 'PATCH')?.body).toMatchObject({
        defaultSettings: { profile: 'mains', nominalFrequencyHz: 16.7, maxOrder: 40 },
        comparisonLimitSetId: set.id,
      }),
    );
  });

  it('says which frequencies it takes', async () => {
    const { seen, user } = open();
    await user.selectOptions(await screen.findByLabelText('Nominal frequency'), 'other');
    await user.type(screen.getByLabelText('Frequency in Hz'), 'fifty');
    await user.click(screen.getByRole('button', { name: 'Save project' }));
    expect(await screen.findByText('Give a frequency from 0.1 Hz to 1 MHz')).toBeTruthy();
    expect(seen.some((request) => request.method === 'PATCH')).toBe(false);
  });
});
