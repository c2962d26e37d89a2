import { screen, waitFor } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { json, mockApi, page } from '../../testing/mock-api.js';
import { renderRoute } from '../../testing/render-route.js';
import { sampleAccount, sampleId, sampleUser } from '../../testing/samples.js';

const jonas = sampleUser({ id: sampleId(3), name: 'Jonas Wiik', email: 'jonas.wiik@halden.example' });

describe('people', () => {
  it('asks before an account is disabled', async () => {
    const seen = mockApi({
      'GET /auth/me': json(sampleAccount({ isAdministrator: true })),
      'GET /users': page([sampleUser({ isAdministrator: true }), jonas]),
      [`PATCH /users/${jonas.id}`]: json({ ...jonas, disabledAt: '2026-11-26T13:20:00Z' }),
    });
    const { user } = renderRoute('/people');
    await user.click(await screen.findByRole('button', { name: 'Change Jonas Wiik' }));
    await user.click(await screen.findByRole('menuitem', { name: 'Disable' }));
    expect(seen.filter((request) => request.method === 'PATCH')).toEqual([]);
    await user.click(await screen.findByRole('button', { name: 'Disable Jonas Wiik' }));
    await waitFor(() =>
      expect(seen).toContainEqual({ method: 'PATCH', path: `/users/${jonas.id}`, body: { disabled: true } }),
    );
  });

  it('turns everybody else away without asking the server', async () => {
    const seen = mockApi({ 'GET /auth/me': json(sampleAccount()) });
    renderRoute('/people');
    expect(await screen.findByText('Only administrators manage accounts')).toBeTruthy();
    expect(seen.map((request) => request.path)).toEqual(['/auth/me']);
  });
});
