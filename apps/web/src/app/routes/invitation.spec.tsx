import { screen, waitFor } from '@testing-library/react';
import { expect, it } from 'vitest';
import { json, mockApi, problem } from '../../testing/mock-api.js';
import { renderRoute } from '../../testing/render-route.js';
import { sampleId } from '../../testing/samples.js';

const offer = {
  projectName: 'Halden',
  role: 'analyst',
  email: 'new@halden.example',
  invitedBy: 'Mara Lind',
  expiresAt: '2026-12-10T13:20:00Z',
  hasAccount: false,
};

it('takes name and password of a newcomer with the secret behind #', async () => {
  const seen = mockApi({
    'POST /invitations/look': json(offer),
    'POST /invitations/accept': problem(410, { detail: 'This invitation was answered already' }),
  });
  const { user } = renderRoute('/invitation#secret_1');
  await user.type(await screen.findByLabelText('Your name'), 'Nell');
  await user.type(screen.getByLabelText('Password'), 'a long password');
  await user.click(screen.getByRole('button', { name: 'Accept' }));
  await waitFor(() =>
    expect(seen.at(-1)).toEqual({
      method: 'POST',
      path: '/invitations/accept',
      body: { token: 'secret_1', name: 'Nell', password: 'a long password' },
    }),
  );
  expect(await screen.findByText('This invitation was answered already')).toBeTruthy();
});

it('asks who has an account to sign in', async () => {
  mockApi({
    'POST /invitations/look': json({ ...offer, hasAccount: true }),
    'GET /auth/me': problem(401),
    'POST /invitations/accept': json({ projectId: sampleId(1), account: null }),
  });
  renderRoute('/invitation#secret_1');
  expect(
    await screen.findByText('new@halden.example has an account. Sign in with it to accept.'),
  ).toBeTruthy();
  expect(screen.getByRole('button', { name: 'Sign in' })).toBeTruthy();
});

it('says so when the link is not complete', async () => {
  const seen = mockApi({});
  renderRoute('/invitation');
  expect(await screen.findByText(/The link is not complete/)).toBeTruthy();
  expect(seen).toEqual([]);
});
