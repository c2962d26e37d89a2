import { ChakraProvider } from '@chakra-ui/react';
import type { ImportPreview, ReadingRule } from '@overtally/contracts';
import { QueryClientProvider } from '@tanstack/react-query';
import { render, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { toaster } from '../../../components/notify.js';
import { queryClient } from '../../../lib/query-client.js';
import { system } from '../../../lib/theme/system.js';
import { json, mockApi, page } from '../../../testing/mock-api.js';
import { samplePreview, sampleRule, sampleSignal } from '../../../testing/sample-previews.js';
import { sampleProject, sampleRecording } from '../../../testing/samples.js';
import { ImportDialog, type ImportSource } from './import-dialog.js';

const projectId = sampleProject().id;
const file: ImportSource = { kind: 'file', file: new File(['t;u;ms'], 'bench-07.csv') };

afterEach(() => toaster.remove());

/** Opens the dialog; the answer to a preview may depend on the options it was asked with. */
function open(
  preview: (options: unknown) => ImportPreview,
  {
    rules = [],
    source = file,
    more = {},
  }: {
    rules?: ReadingRule[];
    source?: ImportSource;
    more?: Parameters<typeof mockApi>[0];
  } = {},
) {
  const onRead = vi.fn();
  const asked: unknown[] = [];
  const seen = mockApi({
    [`GET /projects/${projectId}/reading-rules`]: page(rules),
    [`POST /projects/${projectId}/import-preview`]: (request) => {
      const text = (request.body as FormData).get('import');
      const options: unknown = typeof text === 'string' ? JSON.parse(text) : null;
      asked.push(options);
      return json(preview(options))(request);
    },
    ...more,
  });
  render(
    <ChakraProvider value={system}>
      <QueryClientProvider client={queryClient}>
        <ImportDialog open projectId={projectId} source={source} onClose={vi.fn()} onRead={onRead} />
      </QueryClientProvider>
    </ChakraProvider>,
  );
  return { onRead, asked, seen, user: userEvent.setup() };
}

const read = () => screen.getByRole('button', { name: 'Read with these settings' });

describe('the first cycles of a file', () => {
  it('stand there in their unit, and are asked for anew with a factor', async () => {
    const { user, asked, onRead } = open((options) =>
      samplePreview({ signals: [sampleSignal({ rms: options === null ? 2.3 : 230 })] }),
    );
    expect(await screen.findByText('2.300 V')).toBeTruthy();
    expect(screen.getByText('50.00 Hz')).toBeTruthy();
    expect(screen.getByRole('img', { name: /^u against time/ })).toBeTruthy();
    await user.type(screen.getByLabelText('Probe ratio of column u'), '100 : 1');
    expect(await screen.findByText('230.0 V')).toBeTruthy();
    // The second clock stays out once a column is touched.
    const options = { channels: [{ column: 1, probeRatio: 100 }] };
    expect(asked.at(-1)).toEqual(options);
    await user.click(read());
    expect(onRead).toHaveBeenCalledWith(options, null);
  });

  it('say that no fundamental was found, and in how long a stretch', async () => {
    open(() =>
      samplePreview({ signals: [sampleSignal({ fundamentalHz: null, values: Array(200).fill(0) })] }),
    );
    expect(await screen.findByText('no fundamental found in the first 20.0 ms')).toBeTruthy();
  });

  it('are those of the channel that is chosen', async () => {
    const { user } = open(() =>
      samplePreview({ signals: [sampleSignal(), sampleSignal({ column: 2, name: 'i', unit: 'A', rms: 2 })] }),
    );
    await user.click(await screen.findByRole('radio', { name: 'i' }));
    expect(screen.getByText('2.000 A')).toBeTruthy();
  });
});

describe('columns', () => {
  it('that tell the time are no channels, unless a second clock is chosen', async () => {
    const { user, onRead } = open(() => samplePreview());
    expect((await screen.findByLabelText<HTMLInputElement>('Read column ms')).checked).toBe(false);
    expect(screen.getByLabelText<HTMLInputElement>('Column t tells the time').disabled).toBe(true);
    await user.click(screen.getByLabelText('Read column ms'));
    await user.click(read());
    expect(onRead).toHaveBeenCalledWith({ channels: [{ column: 1 }, { column: 2 }] }, null);
  });

  it('say beside the field what cannot be read, and hold the reading back', async () => {
    const { user } = open(() => samplePreview());
    const ratio = await screen.findByLabelText('Probe ratio of column u');
    await user.type(ratio, '1:100');
    expect(ratio.getAttribute('aria-invalid')).toBe('true');
    expect(screen.getByText('Write 100 : 1 where the probe divides by 100')).toBeTruthy();
    expect(read()).toHaveProperty('disabled', true);
  });

  it('pass their scaling on to the others of the unit', async () => {
    const stereo = samplePreview({
      format: 'wav',
      lines: [],
      columns: [0, 1].map((index) => ({
        ...{ index, name: `ch${index + 1}`, unit: '', quantity: 'dimensionless' as const },
      })),
      rows: [[0, 0]],
      ...{ timeColumn: null, clockColumns: [], signals: [] },
    });
    const { user, onRead } = open(() => stereo);
    await user.type(await screen.findByLabelText('Unit of column ch1'), 'V');
    await user.type(screen.getByLabelText('Input at full scale of column ch1'), '10');
    await user.click(screen.getByRole('button', { name: 'Scale the other one in V like column ch1' }));
    await user.click(read());
    const scaled = { unit: 'V', fullScale: 10 };
    expect(onRead).toHaveBeenCalledWith(
      {
        channels: [
          { column: 0, ...scaled },
          { column: 1, ...scaled },
        ],
      },
      null,
    );
  });
});

describe('reading rules', () => {
  const rule = sampleRule();
  const byRule = (options: unknown) =>
    samplePreview(
      options === null ? { readingRule: { id: rule.id, name: rule.name }, options: rule.options } : {},
    );

  it('are named where one fits, filled in, and left on request', async () => {
    const { user, onRead } = open(byRule, { rules: [rule] });
    expect(await screen.findByText(/, which fits this file/)).toBeTruthy();
    expect(screen.getByLabelText<HTMLInputElement>('Probe ratio of column u').value).toBe('100 : 1');
    await user.click(read());
    expect(onRead).toHaveBeenLastCalledWith(rule.options, rule.id);
    await user.selectOptions(screen.getByLabelText('Settings from'), 'none');
    await user.click(read());
    expect(onRead).toHaveBeenLastCalledWith({}, null);
  });

  it('are updated where their settings were changed on a file', async () => {
    const options = { channels: [{ column: 1, probeRatio: 10 }] };
    const { user, seen } = open(byRule, {
      rules: [rule],
      more: { [`PATCH /reading-rules/${rule.id}`]: json({ ...rule, options }) },
    });
    const ratio = await screen.findByLabelText('Probe ratio of column u');
    expect(screen.queryByRole('button', { name: 'Update the rule' })).toBeNull();
    await user.clear(ratio);
    await user.type(ratio, '10');
    await user.click(await screen.findByRole('button', { name: 'Update the rule' }));
    await waitFor(() => expect(seen.find(({ method }) => method === 'PATCH')?.body).toEqual({ options }));
  });

  it('are made of the settings of a file, bound to its kind of name and its columns', async () => {
    const { user, seen } = open(() => samplePreview(), {
      more: { [`POST /projects/${projectId}/reading-rules`]: json(rule, 201) },
    });
    await user.type(await screen.findByLabelText('Probe ratio of column u'), '100');
    await user.click(screen.getByRole('button', { name: /Keep these settings as a reading rule/ }));
    const form = within(screen.getByRole('form', { name: 'New reading rule' }));
    expect(form.getByLabelText<HTMLInputElement>('For files named').value).toBe('bench-*.csv');
    await user.clear(form.getByLabelText('Name of the rule'));
    await user.type(form.getByLabelText('Name of the rule'), 'Bench scope, CSV');
    await user.click(form.getByRole('button', { name: 'Keep the rule' }));
    await waitFor(() =>
      expect(seen.find(({ path }) => path.endsWith('/reading-rules') && path)?.path).toBeTruthy(),
    );
    expect(seen.findLast(({ method, path }) => method === 'POST' && path.endsWith('rules'))?.body).toEqual({
      name: 'Bench scope, CSV',
      fileNamePattern: 'bench-*.csv',
      columnNames: ['t', 'u', 'ms'],
      options: { channels: [{ column: 1, probeRatio: 100 }] },
    });
  });

  it('are refused where they do not fit the file they are made of', async () => {
    const { user } = open(() => samplePreview());
    await user.type(await screen.findByLabelText('Gain of column u'), '2');
    await user.click(screen.getByRole('button', { name: /Keep these settings as a reading rule/ }));
    const pattern = screen.getByLabelText('For files named');
    await user.clear(pattern);
    await user.type(pattern, 'scope*.csv');
    await user.click(screen.getByRole('button', { name: 'Keep the rule' }));
    expect(await screen.findByText('Does not fit this file, bench-07.csv')).toBeTruthy();
  });
});

describe('a recording that is read again', () => {
  it('begins with the settings it was read with, and knows a rule that was deleted', async () => {
    const recording = sampleRecording({
      import: { channels: [{ column: 1, gain: 2 }] },
      readingRule: { id: null, name: 'Old scope' },
    });
    const { asked } = open(() => samplePreview(), {
      source: { kind: 'recording', recording },
      more: { [`GET /recordings/${recording.id}/source`]: () => new Response('t;u;ms') },
    });
    expect(await screen.findByText(/which was deleted since/)).toBeTruthy();
    expect((await screen.findByLabelText<HTMLInputElement>('Gain of column u')).value).toBe('2');
    expect(asked).not.toContain(null);
  });
});

describe('a problem with a line', () => {
  it('leads to that line where it is shown, and only there', async () => {
    const problem = { code: 'odd-row', message: 'The row has one cell.', cure: 'See line 40.', line: 2 };
    const { user } = open(() => samplePreview({ problem, doubts: [] }));
    await user.click(await screen.findByRole('button', { name: 'line 2' }));
    const line = screen.getByText('0,0000;0,000;0').closest('li');
    expect(line?.getAttribute('aria-current')).toBe('true');
    expect(document.activeElement).toBe(line);
    expect(screen.queryByRole('button', { name: 'line 40' })).toBeNull();
  });
});
