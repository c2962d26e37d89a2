import type { ProjectRole } from '@overtally/contracts';
import { screen, waitFor, within } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { json, mockApi, problem } from '../../../testing/mock-api.js';
import { renderRoute } from '../../../testing/render-route.js';
import { sampleReport } from '../../../testing/sample-verdicts.js';
import { sampleAccount, sampleProject } from '../../../testing/samples.js';

const project = sampleProject().id;
const { id } = sampleReport('draft');
const address = `/projects/${project}/reports/${id}`;

const answers = (role: ProjectRole, report = sampleReport('draft')) => ({
  'GET /auth/me': json(sampleAccount()),
  [`GET /projects/${project}`]: json(sampleProject({ role })),
  [`GET /reports/${id}`]: json(report),
});
const buttons = () => screen.getAllByRole('button').map((button) => button.textContent);

describe('report', () => {
  it('shows what was judged, and lets an analyst change and submit a draft but not issue it', async () => {
    mockApi(answers('analyst'));
    renderRoute(address);
    expect(await screen.findByRole('heading', { name: /R-0147 Bench dimmer/ })).toBeTruthy();
    expect(screen.getByText('Mean above the limit')).toBeTruthy();
    expect(buttons()).toEqual(expect.arrayContaining(['Edit', 'Delete draft', 'Submit for review']));
    expect(buttons()).not.toContain('Issue');
  });

  it('lets a guest read an issued report with its SHA-256 and do nothing with it', async () => {
    mockApi(answers('guest', sampleReport('issued')));
    renderRoute(address);
    expect(await screen.findByText('ab'.repeat(32))).toBeTruthy();
    expect(screen.getByRole('link', { name: 'Open PDF' }).getAttribute('href')).toBe(
      `/api/reports/${id}/pdf`,
    );
    expect(buttons()).not.toEqual(expect.arrayContaining(['Edit']));
    expect(screen.queryByRole('button', { name: 'Return' })).toBeNull();
  });

  it('is returned only with words on what must be mended', async () => {
    const seen = mockApi({
      ...answers('manager', sampleReport('in-review')),
      [`POST /reports/${id}/return`]: json(sampleReport('draft')),
    });
    const { user } = renderRoute(address);
    await user.click(await screen.findByRole('button', { name: 'Return' }));
    const dialog = await screen.findByRole('alertdialog');
    await user.click(within(dialog).getByRole('button', { name: 'Return the report' }));
    expect(await within(dialog).findByText('Say what must be mended')).toBeTruthy();
    await user.type(within(dialog).getByLabelText(/What must be mended/), 'Name the probe');
    await user.click(within(dialog).getByRole('button', { name: 'Return the report' }));
    await waitFor(() =>
      expect(seen).toContainEqual({
        method: 'POST',
        path: `/reports/${id}/return`,
        body: { comment: 'Name the probe' },
      }),
    );
  });

  it('says why it was not issued when somebody else was quicker', async () => {
    const detail = 'The report is issued: it can only be read';
    mockApi({
      ...answers('manager', sampleReport('in-review')),
      [`POST /reports/${id}/issue`]: problem(409, { title: 'Conflict', detail }),
    });
    const { user } = renderRoute(address);
    await user.click(await screen.findByRole('button', { name: 'Issue' }));
    const dialog = await screen.findByRole('alertdialog', { name: 'Issue this report?' });
    expect(within(dialog).getByText(/cannot be changed, returned or deleted/)).toBeTruthy();
    await user.click(within(dialog).getByRole('button', { name: 'Issue the report' }));
    expect(await within(dialog).findByText(detail)).toBeTruthy();
  });
});
