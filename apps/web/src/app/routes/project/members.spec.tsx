import { screen, waitFor, within } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { json, mockApi, noContent, page } from '../../../testing/mock-api.js';
import { renderRoute } from '../../../testing/render-route.js';
import { sampleAccount, sampleId, sampleMember, sampleProject } from '../../../testing/samples.js';

const { id } = sampleProject();
const address = `/projects/${id}/members`;
const ada = sampleMember({
  userId: sampleId(2),
  name: 'Ada Berg',
  email: 'ada.berg@halden.example',
  role: 'analyst',
});

const answers = (role: 'manager' | 'guest') => ({
  'GET /auth/me': json(sampleAccount()),
  [`GET /projects/${id}`]: json(sampleProject({ role })),
  [`GET /projects/${id}/members`]: page([sampleMember({ role }), ada]),
});

describe('members', () => {
  it('lets a guest see who takes part and change nothing', async () => {
    mockApi(answers('guest'));
    renderRoute(address);
    expect(await screen.findByText('Ada Berg')).toBeTruthy();
    expect(screen.queryByRole('button', { name: 'Add member' })).toBeNull();
    expect(screen.queryByRole('button', { name: /Remove/ })).toBeNull();
  });

  it('asks before a member is removed, and takes it back', async () => {
    let members = [sampleMember(), ada];
    const seen = mockApi({
      ...answers('manager'),
      [`GET /projects/${id}/members`]: (request) => page(members)(request),
      [`DELETE /projects/${id}/members/${ada.userId}`]: (request) => {
        members = [sampleMember()];
        return noContent()(request);
      },
      [`POST /projects/${id}/members`]: json(ada, 201),
    });
    const { user } = renderRoute(address);
    await user.click(await screen.findByRole('button', { name: 'Remove Ada Berg' }));
    const dialog = await screen.findByRole('alertdialog', { name: 'Remove Ada Berg?' });
    await user.click(within(dialog).getByRole('button', { name: 'Remove Ada Berg' }));
    await user.click(await screen.findByRole('button', { name: 'Undo' }));
    await waitFor(() =>
      expect(seen).toContainEqual({
        method: 'POST',
        path: `/projects/${id}/members`,
        body: { email: ada.email, role: 'analyst' },
      }),
    );
  });

  it('shows what each role may do as the permissions say', async () => {
    mockApi(answers('guest'));
    renderRoute(address);
    const table = await screen.findByRole('table', { name: 'What each role may do' });
    const row = within(table).getByRole('rowheader', { name: 'Return and issue reports' }).closest('tr');
    if (!row) throw new Error('The duty stands in no row');
    const held = within(row)
      .getAllByRole('cell')
      .map((cell) => cell.textContent?.replace(/[✓–]/, ''));
    expect(held).toEqual(['no', 'no', 'yes', 'no']);
  });
});
