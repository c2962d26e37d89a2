import { mkdtemp, readdir, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { ComputeContext } from '../../jobs/compute-task.js';
import { DiskStorage } from '../../storage/disk-storage.js';
import { npyCount, readNpy } from '../../storage/npy.js';
import { readTask } from './read-task.js';

let folder: string;
let storage: DiskStorage;

beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'read-task-'));
  storage = new DiskStorage(join(folder, 'storage'));
});

afterEach(() => rm(folder, { recursive: true, force: true }));

async function readTable(text: string) {
  const bytes = new TextEncoder().encode(text);
  await storage.put('source', bytes);
  const scratchFolder = await mkdtemp(join(folder, 'scratch-'));
  const context: ComputeContext = {
    storage,
    scratchFolder,
    workers: 1,
    reportProgress: () => undefined,
    shouldStop: () => false,
    delegate: () => Promise.reject(new Error('nothing is delegated')),
  };
  const input = { sourceKey: 'source', fileName: 'a.csv', sizeBytes: bytes.length, options: {} };
  const result = await readTask({ ...input, outputPrefix: 'out' }, context);
  return { result, left: await readdir(scratchFolder) };
}

describe('reading a source into storage', () => {
  it('stores a table with uneven time stamps once, resampled', async () => {
    const count = 2000;
    const sine = (time: number) => Math.sin(2 * Math.PI * 50 * time);
    // Off by up to 30 % of the interval, first and last exact.
    const off = (n: number) =>
      n === 0 || n === count - 1 ? 0 : 0.3 * (2 * ((n * 0.7548776662466927) % 1) - 1);
    const times = Array.from({ length: count }, (_, n) => (n + off(n)) / 4000);
    const rows = times.map((time) => `${time},${sine(time)}`);
    const { result, left } = await readTable(`t (s),u (V)\n${rows.join('\n')}\n`);
    expect(result).toMatchObject({ sampleCount: count, channels: [{ samplesKey: 'out/channel-0.npy' }] });
    expect(left).toEqual([]);
    const values = await readNpy(storage, 'out/channel-0.npy', 0, count);
    expect(await npyCount(storage, 'out/channel-0.npy')).toBe(count);
    for (const [n, value] of values.entries()) expect(Math.abs(value - sine(n / 4000))).toBeLessThan(1e-5);
  });

  it('leaves nothing in the scratch folder of a file that is refused', async () => {
    const { result, left } = await readTable('t (s),u (V)\n0,1\n1,2\n2,3\n1,4\n');
    expect(result).toMatchObject({ ok: false, problem: { code: 'time-not-increasing', line: 5 } });
    expect(left).toEqual([]);
  });
});
