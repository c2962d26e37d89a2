import { screen, within } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { json, mockApi, page, problem } from '../../testing/mock-api.js';
import { renderRoute } from '../../testing/render-route.js';
import { sampleAccount, sampleId, sampleProject } from '../../testing/samples.js';

const me = { 'GET /auth/me': json(sampleAccount()) };

describe('projects', () => {
  it('says what to do when there is none', async () => {
    mockApi({ ...me, 'GET /projects': page([]) });
    renderRoute('/projects');
    expect(await screen.findByRole('heading', { name: 'No project yet' })).toBeTruthy();
    expect(screen.getByRole('button', { name: 'New project' })).toBeTruthy();
  });

  it('shows each with its role and counts, and finds by customer', async () => {
    const projects = [
      sampleProject(),
      sampleProject({ id: sampleId(11), name: 'Track lights', customer: 'Nordlys', role: 'guest' }),
    ];
    mockApi({ ...me, 'GET /projects': page(projects) });
    const { user } = renderRoute('/projects');
    const row = (await screen.findByRole('link', { name: /Halden kiln/ })).closest('tr');
    if (!row) throw new Error('The project stands in no row');
    expect(within(row).getByText('148')).toBeTruthy();
    expect(within(row).getByText('manager')).toBeTruthy();
    await user.type(screen.getByRole('searchbox', { name: 'Search projects' }), 'nordlys');
    expect(screen.queryByRole('link', { name: /Halden kiln/ })).toBeNull();
    expect(screen.getByRole('link', { name: 'Track lights' })).toBeTruthy();
  });

  it('puts the message of the server beside its field', async () => {
    mockApi({
      ...me,
      'GET /projects': page([]),
      'POST /projects': problem(400, {
        errors: [{ path: 'customer', message: 'This customer is not known' }],
      }),
    });
    const { user } = renderRoute('/projects');
    await user.click(await screen.findByRole('button', { name: 'New project' }));
    await user.type(await screen.findByLabelText('Name'), 'Kiln');
    await user.click(screen.getByRole('button', { name: 'Create project' }));
    expect(await screen.findByText('This customer is not known')).toBeTruthy();
    expect(screen.getByLabelText(/Customer/).getAttribute('aria-invalid')).toBe('true');
  });

  it('shows the archived ones apart', async () => {
    const seen = mockApi({ ...me, 'GET /projects': page([]) });
    const { user } = renderRoute('/projects');
    await user.click(await screen.findByRole('radio', { name: 'Archived' }));
    expect(await screen.findByRole('heading', { name: 'No archived project' })).toBeTruthy();
    expect(seen.at(-1)?.path).toBe('/projects?archived=true&limit=200');
  });
});
