import { accessKeySchema, createdAccessKeySchema, type AccessKey } from '@overtally/contracts';
import { screen, waitFor, within } from '@testing-library/react';
import { describe, expect, it, vi } from 'vitest';
import { json, mockApi, noContent, page, problem } from '../../testing/mock-api.js';
import { renderRoute } from '../../testing/render-route.js';
import { sampleAccount, sampleId } from '../../testing/samples.js';

const key = (change: Partial<AccessKey> = {}): AccessKey =>
  accessKeySchema.parse({
    ...{ id: sampleId(70), name: 'Bench computer', prefix: 'ovt_Ab3dEf' },
    ...{ createdAt: '2026-11-26T13:20:00Z', lastUsedAt: null, expiresAt: null },
    ...change,
  });
const signedIn = { 'GET /auth/me': json(sampleAccount()) };

describe('access keys on the account page', () => {
  it('are listed with their use and their end', async () => {
    const expired = key({ id: sampleId(71), name: 'Old laptop', expiresAt: '2020-03-01T12:00:00Z' });
    mockApi({ ...signedIn, 'GET /auth/keys': page([key(), expired]) });
    renderRoute('/account');
    const table = await screen.findByRole('table', { name: 'Access keys' });
    const rows = within(table).getAllByRole('row').slice(1);
    expect(rows[0]!.textContent).toMatch(/Bench computer.*ovt_Ab3dEf….*not yet.*when removed/);
    expect(rows[1]!.textContent).toMatch(/Old laptop.*expired on/);
  });

  it('show their secret once, to be copied', async () => {
    const secret = `ovt_${'Ab3dEfGhI'.repeat(5).slice(0, 43)}`;
    const made = createdAccessKeySchema.parse({ ...key(), secret });
    const seen = mockApi({
      ...signedIn,
      'GET /auth/keys': page([]),
      'POST /auth/keys': json(made, 201),
    });
    const { user } = renderRoute('/account');
    await user.click(await screen.findByRole('button', { name: 'New access key' }));
    const dialog = within(await screen.findByRole('dialog'));
    await user.click(dialog.getByRole('button', { name: 'Make key' }));
    expect(await dialog.findByText('Name the key')).toBeTruthy();
    await user.type(dialog.getByRole('textbox', { name: /^Name/ }), 'Bench computer');
    await user.selectOptions(dialog.getByRole('combobox', { name: 'Valid for' }), 'until it is removed');
    const write = vi.spyOn(navigator.clipboard, 'writeText');
    await user.click(dialog.getByRole('button', { name: 'Make key' }));
    await user.click(await dialog.findByRole('button', { name: 'Copy' }));
    expect(write).toHaveBeenCalledWith(secret);
    expect(seen).toContainEqual({ method: 'POST', path: '/auth/keys', body: { name: 'Bench computer' } });
    await user.click(dialog.getByRole('button', { name: 'Done' }));
    await waitFor(() => expect(screen.queryByDisplayValue(secret)).toBeNull());
    await user.click(screen.getByRole('button', { name: 'New access key' }));
    expect(await screen.findByRole('button', { name: 'Make key' })).toBeTruthy();
    expect(screen.queryByDisplayValue(secret)).toBeNull();
  });

  it('are removed once the person has said so', async () => {
    const seen = mockApi({
      ...signedIn,
      'GET /auth/keys': page([key()]),
      [`DELETE /auth/keys/${key().id}`]: noContent(),
    });
    const { user } = renderRoute('/account');
    const removals = () => seen.filter(({ method }) => method === 'DELETE');
    await user.click(await screen.findByRole('button', { name: 'Remove Bench computer' }));
    const dialog = await screen.findByRole('alertdialog');
    expect(removals()).toEqual([]);
    await user.click(within(dialog).getByRole('button', { name: 'Remove Bench computer' }));
    await waitFor(() => expect(removals()).toHaveLength(1));
    expect(await screen.findByText('Bench computer removed')).toBeTruthy();
  });

  it('say why they cannot be made', async () => {
    const detail = 'A key cannot make another key; sign in to make one';
    mockApi({ ...signedIn, 'GET /auth/keys': page([]), 'POST /auth/keys': problem(403, { detail }) });
    const { user } = renderRoute('/account');
    await user.click(await screen.findByRole('button', { name: 'New access key' }));
    const dialog = within(await screen.findByRole('dialog'));
    await user.type(dialog.getByRole('textbox', { name: /^Name/ }), 'Bench');
    await user.click(dialog.getByRole('button', { name: 'Make key' }));
    expect(await dialog.findByText(detail)).toBeTruthy();
  });
});
