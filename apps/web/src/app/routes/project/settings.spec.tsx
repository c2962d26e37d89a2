import { screen, waitFor, within } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { json, mockApi, noContent, page } from '../../../testing/mock-api.js';
import { renderRoute } from '../../../testing/render-route.js';
import { sampleRule } from '../../../testing/sample-previews.js';
import { sampleAccount, sampleLimitSet, sampleProject } from '../../../testing/samples.js';

const project = sampleProject({
  defaultSettings: { profile: 'mains', nominalFrequencyHz: 'auto', maxOrder: 40 },
});
const set = sampleLimitSet();

const open = (more: Parameters<typeof mockApi>[0] = {}) => {
  const seen = mockApi({
    'GET /auth/me': json(sampleAccount()),
    [`GET /projects/${project.id}`]: json(project),
    [`PATCH /projects/${project.id}`]: json(project),
    'GET /limit-sets': page([set]),
    'GET /projects': page([project]),
    [`GET /projects/${project.id}/reading-rules`]: page([]),
    ...more,
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

describe('reading rules of a project', () => {
  const rule = sampleRule();
  const listed = { [`GET /projects/${project.id}/reading-rules`]: page([rule]) };

  it('say which files they are for and what they set, in words', async () => {
    open(listed);
    const row = within((await screen.findByText(rule.name)).closest('tr')!);
    expect(row.getByText('bench-*.csv')).toBeTruthy();
    expect(row.getByText('with the columns t, u, ms')).toBeTruthy();
    expect(row.getAllByText('column 2: probe 100 : 1').length).toBeGreaterThan(0);
    expect(row.getByText('3')).toBeTruthy();
  });

  it('are told how to be made where there is none', async () => {
    open();
    expect(await screen.findByText('No reading rule yet')).toBeTruthy();
    expect(screen.getByText(/tick “Check before reading”/)).toBeTruthy();
  });

  it('are renamed and freed of their columns, and deleted after a question', async () => {
    const { seen, user } = open({
      ...listed,
      [`PATCH /reading-rules/${rule.id}`]: json(rule),
      [`DELETE /reading-rules/${rule.id}`]: noContent(),
    });
    await user.click(await screen.findByRole('button', { name: `Edit ${rule.name}` }));
    const dialog = within(await screen.findByRole('dialog'));
    await user.click(dialog.getByLabelText('Only files with these columns'));
    await user.clear(dialog.getByLabelText('For files named'));
    await user.type(dialog.getByLabelText('For files named'), 'scope-*.csv');
    await user.click(dialog.getByRole('button', { name: 'Save' }));
    await waitFor(() =>
      expect(seen.find((request) => request.method === 'PATCH')?.body).toEqual({
        name: rule.name,
        fileNamePattern: 'scope-*.csv',
        columnNames: null,
      }),
    );
    await user.click(await screen.findByRole('button', { name: `Delete ${rule.name}` }));
    expect(seen.some((request) => request.method === 'DELETE')).toBe(false);
    await user.click(await screen.findByRole('button', { name: 'Delete the rule' }));
    await waitFor(() => expect(seen.some((request) => request.method === 'DELETE')).toBe(true));
  });

  it('are read by a guest, who can change nothing', async () => {
    open({ ...listed, [`GET /projects/${project.id}`]: json({ ...project, role: 'guest' }) });
    expect(await screen.findByText(rule.name)).toBeTruthy();
    expect(screen.queryByRole('button', { name: `Edit ${rule.name}` })).toBeNull();
    expect(screen.queryByRole('button', { name: 'Save project' })).toBeNull();
  });
});
