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

  it('says why a manager cannot issue what that manager submitted', async () => {
    const own = { id: sampleAccount().id, name: sampleAccount().name };
    mockApi(answers('manager', sampleReport('in-review', { submittedBy: own })));
    renderRoute(address);
    const issue = await screen.findByRole('button', { name: 'Issue', description: /another manager/ });
    expect(issue).toHaveProperty('disabled', true);
    expect(buttons()).toEqual(expect.arrayContaining(['Withdraw', 'Return']));
  });

  it('shows what must be mended, and asks for the reason of overdue calibration', async () => {
    const by = { id: sampleAccount().id, name: 'Maren Lund' };
    const returned = { by, at: '2026-11-27T10:00:00Z', comment: 'Name the probe' };
    mockApi(answers('analyst', sampleReport('draft', { returned })));
    renderRoute(address);
    expect(await screen.findByRole('region', { name: 'Returned for mending' })).toHaveProperty(
      'textContent',
      expect.stringMatching(/Maren Lund.*Name the probe/),
    );
  });

  it('is issued in spite of overdue calibration only with a reason', async () => {
    const message = 'Probe, no. 7, used for R-0147: calibration was due on 2026-02-03, before the capture';
    const cautions = [{ code: 'calibration-overdue' as const, section: 0, message }];
    const seen = mockApi({
      ...answers('manager', sampleReport('in-review', { cautions })),
      [`POST /reports/${id}/issue`]: json(sampleReport('issued')),
    });
    const { user } = renderRoute(address);
    await user.click(await screen.findByRole('button', { name: 'Issue' }));
    const dialog = await screen.findByRole('alertdialog');
    await user.click(within(dialog).getByRole('button', { name: 'Issue the report' }));
    expect(await within(dialog).findByText(/Say in at least 20 characters/)).toBeTruthy();
    const overdueReason = 'Compared with the reference probe on the day';
    await user.type(within(dialog).getByLabelText(/Why the results stand/), overdueReason);
    await user.click(within(dialog).getByRole('button', { name: 'Issue the report' }));
    await waitFor(() =>
      expect(seen).toContainEqual({
        method: 'POST',
        path: `/reports/${id}/issue`,
        body: { comment: '', overdueReason },
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
