import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { main } from '../src/main.js';
import { runCases } from '../src/run-cases.js';

let folder: string;
beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'cases-'));
  const rows = Array.from({ length: 2000 }, (_, n) => {
    const t = n / 5000;
    return `${t},${Math.SQRT2 * 10 * Math.cos(2 * Math.PI * 51 * t + Math.PI / 6)}`;
  });
  await writeFile(join(folder, 'sine.csv'), ['time_s,u_V', ...rows, ''].join('\n'));
});
afterEach(async () => {
  vi.restoreAllMocks();
  await rm(folder, { recursive: true });
});

const file = {
  ...{ name: 'sine.csv', format: 'csv', sample_rate_hz: 5000, time_column: 'time_s' },
  channels: [{ name: 'u_V', unit: 'V', scale: 3 }],
};

const describeCases = (...cases: object[]) =>
  writeFile(join(folder, 'cases.json'), JSON.stringify({ cases }));

describe('a folder of cases', () => {
  it('is answered from its records, scaled, and never from how they were made', async () => {
    await describeCases({
      ...{ id: 'A', family: 1, files: [file], analysis: { nominal_hz: 50 } },
      generator: { f0_hz: 40, amplitude: 1 },
    });
    const { results } = await runCases(folder);
    expect(results.A).toMatchObject({
      f0_hz: expect.closeTo(51, 4),
      fundamental_rms: expect.closeTo(30, 4),
      amplitude: expect.closeTo(30 * Math.SQRT2, 4),
      phase_deg: expect.closeTo(30, 4),
    });
  });

  it('takes the input of a case without a record from its generator', async () => {
    await describeCases({
      id: 'H',
      family: 8,
      generator: { num: [1], den: [1, 1] },
      analysis: { frequencies_hz: [0] },
    });
    const { results } = await runCases(folder);
    expect(results.H).toMatchObject({ magnitude: [1], poles: [[-1, 0]], stability: 'stable', dc_gain: 1 });
  });

  it('leaves out what cannot be served, and says why', async () => {
    await describeCases(
      { id: 'X', family: 99, files: [file] },
      { id: 'Y', family: 1, files: [] },
      { id: 'Z', family: 1, files: [{ ...file, channels: [{ name: 'i_A', unit: 'A', scale: 1 }] }] },
      { id: 'W', family: 7, generator: { window: 'parzen', N: 64 } },
      { id: 'V', family: 9, files: [{ name: 'none.csv' }] },
    );
    const { results, leftOut, failed } = await runCases(folder);
    expect(failed).toEqual([{ id: 'V', error: expect.objectContaining({ code: 'ENOENT' }) }]);
    expect(results).toEqual({});
    expect(leftOut).toEqual([
      { id: 'X', reason: 'nothing computes family 99' },
      { id: 'Y', reason: 'the case has no file' },
      { id: 'Z', reason: expect.stringContaining('"i_A" is not in the file') },
      { id: 'W', reason: 'there is no window "parzen"' },
    ]);
  });
});

describe('the command', () => {
  it('prints one JSON object on standard output and the rest elsewhere', async () => {
    await describeCases({ id: 'A', family: 1, files: [file] }, { id: 'X', family: 99 });
    const out = vi.spyOn(process.stdout, 'write').mockReturnValue(true);
    const err = vi.spyOn(process.stderr, 'write').mockReturnValue(true);
    expect(await main([folder])).toBe(0);
    const printed = out.mock.calls.map(([text]) => String(text)).join('');
    expect(Object.keys(JSON.parse(printed) as object)).toEqual(['A']);
    expect(err.mock.calls).toEqual([['X left out: nothing computes family 99\n']]);
  });

  it('says how it is called', async () => {
    const err = vi.spyOn(process.stderr, 'write').mockReturnValue(true);
    expect(await main([])).toBe(2);
    expect(String(err.mock.calls[0])).toContain('pnpm cases DIR');
  });
});
