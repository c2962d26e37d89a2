import { screen } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { json, mockApi, page, problem } from '../../testing/mock-api.js';
import { renderRoute } from '../../testing/render-route.js';
import { sampleAccount, sampleProject } from '../../testing/samples.js';

async function fillIn(user: ReturnType<typeof renderRoute>['user']) {
  await user.type(await screen.findByLabelText('E-mail'), 'Mara.Lind@halden.example');
  await user.type(screen.getByLabelText('Password'), 'correct horse battery');
  await user.click(screen.getByRole('button', { name: 'Sign in' }));
}

describe('signing in', () => {
  it('says that e-mail or password is not right, and empties the password', async () => {
    mockApi({ 'POST /auth/sign-in': problem(401, { detail: 'Refused' }) });
    const { user } = renderRoute('/sign-in');
    await fillIn(user);
    expect((await screen.findByRole('alert')).textContent).toBe('E-mail or password is not right.');
    expect(screen.getByLabelText<HTMLInputElement>('Password').value).toBe('');
  });

  it('says how long to wait after too many attempts', async () => {
    mockApi({ 'POST /auth/sign-in': problem(429, {}, { 'retry-after': '840' }) });
    const { user } = renderRoute('/sign-in');
    await fillIn(user);
    expect((await screen.findByRole('alert')).textContent).toBe('Too many attempts. Try again in 14 min.');
  });

  it('asks nobody when the form is not filled in', async () => {
    const seen = mockApi({});
    const { user } = renderRoute('/sign-in');
    await user.click(await screen.findByRole('button', { name: 'Sign in' }));
    expect(await screen.findByText('Give your e-mail address')).toBeTruthy();
    expect(seen).toEqual([]);
  });

  it('leads back to the address that was wanted', async () => {
    mockApi({ 'GET /auth/me': problem(401) });
    const { router, user } = renderRoute('/projects?from=mail');
    await screen.findByLabelText('E-mail');
    mockApi({ 'POST /auth/sign-in': json(sampleAccount()), 'GET /projects': page([sampleProject()]) });
    await fillIn(user);
    expect(await screen.findByRole('heading', { name: 'Projects' })).toBeTruthy();
    expect(router.state.location.search).toBe('?from=mail');
  });
});
