import { screen, waitFor } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { json, mockApi } from '../../testing/mock-api.js';
import { renderRoute } from '../../testing/render-route.js';
import { sampleId, sampleAccount } from '../../testing/samples.js';

const mail = {
  id: sampleId(7),
  kind: 'invitation',
  to: { name: '', email: 'new@halden.example' },
  subject: 'Invitation to Halden',
  status: 'failed',
  attempts: 1,
  lastError: '550 No such mailbox',
  createdAt: '2026-11-26T13:20:00Z',
  lastAttemptAt: '2026-11-26T13:20:01Z',
  sentAt: null,
  attachments: [],
};

describe('the mailbox', () => {
  it('says what became of a message in words, and asks for one status by the address', async () => {
    const seen = mockApi({
      'GET /auth/me': json(sampleAccount({ isAdministrator: true })),
      'GET /mails': json({ items: [mail], nextCursor: null, delivery: 'smtp' }),
    });
    const { user } = renderRoute('/mailbox');
    expect(await screen.findByText('550 No such mailbox')).toBeTruthy();
    expect(screen.getByText('failed, 1 attempt')).toBeTruthy();
    await user.click(screen.getByRole('radio', { name: 'Failed' }));
    await waitFor(() => expect(seen.at(-1)?.path).toBe('/mails?status=failed'));
    expect(await screen.findByRole('link', { name: 'Invitation to Halden' })).toBeTruthy();
  });

  it('shows a message where nothing of it runs', async () => {
    mockApi({
      'GET /auth/me': json(sampleAccount({ isAdministrator: true })),
      [`GET /mails/${mail.id}`]: json({
        ...mail,
        from: 'reports@lab.example',
        messageId: '<1@lab.example>',
        text: 'Plain words',
        html: '<script>parent.broken = true</script><p>Words</p>',
        link: null,
      }),
    });
    const { user } = renderRoute(`/mailbox/${mail.id}`);
    const frame = await screen.findByTitle<HTMLIFrameElement>('Invitation to Halden');
    // HTML, 4.8.5: scripts run in a sandboxed frame only where allow-scripts stands.
    expect(frame.getAttribute('sandbox')).not.toContain('allow-scripts');
    expect(frame.getAttribute('sandbox')).not.toContain('allow-same-origin');
    await user.click(screen.getByRole('radio', { name: 'Plain text' }));
    expect(await screen.findByText('Plain words')).toBeTruthy();
  });
});
