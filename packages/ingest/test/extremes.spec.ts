import { describe, expect, it } from 'vitest';
import { previewRecording } from '../src/index.js';
import { readBad, readGood } from './support.js';
import { chunk, formatChunk, join, wavFile } from './wav-builder.js';

const text = (value: string) => new TextEncoder().encode(value);

describe('more channels than are read at a time', () => {
  const columns = Array.from({ length: 600 }, (_, i) => `u${i} (V)`);
  const rows = Array.from({ length: 20 }, (_, n) => [n / 1000, ...columns.map((_, i) => n + i)].join(','));
  const table = [['t (s)', ...columns].join(','), ...rows, ''].join('\n');
  const wav = wavFile(formatChunk({ channels: 600 }), chunk('data', new Uint8Array(2 * 600 * 4)));

  it.each([
    ['a table', table],
    ['a WAV file', wav],
  ])('are refused in %s, and read when some are chosen', async (_, file) => {
    const problem = await readBad(file);
    expect(problem).toMatchObject({ code: 'too-many-channels' });
    expect(problem.message).toContain('600');
    expect(problem.cure).toContain('512');
    const { channels } = await readGood(file, { channels: [{ column: 2 }] });
    expect(channels).toHaveLength(1);
  });
});

describe('control characters', () => {
  it('stay out of names, units and metadata', async () => {
    const rows = Array.from({ length: 2000 }, (_, n) => `${n / 1000},${n % 7}`);
    const file = ['Operator: Lie\0\0', 't (s)\0,u\0\x01 (V\0)\0\0', ...rows, ''].join('\n');
    const { channels, metadata, samples } = await readGood(file);
    expect(channels[0]).toMatchObject({ name: 'u', unit: 'V' });
    expect(metadata).toEqual({ Operator: 'Lie' });
    expect(samples[0]).toHaveLength(2000);
  });
});

describe('sample rates no capture has', () => {
  it.each([5e-324, 1e-4, 1e11, Infinity])('are refused when given: %d Hz', async (sampleRateHz) => {
    expect(await readBad('u (V)\n1\n2\n', { sampleRateHz })).toMatchObject({ code: 'bad-sample-rate' });
  });

  it.each(['1e-300', '1e6'])('are refused when the time column says steps of %s s', async (step) => {
    const rows = Array.from({ length: 20 }, (_, n) => `${n * Number(step)},${n}`);
    const file = ['t (s),u (V)', ...rows, ''].join('\n');
    expect((await readBad(file)).cure).toMatch(/unit of the time column/);
    expect((await previewRecording(text(file), { fileName: 'a.csv' })).sampleRateHz).toBeNull();
  });
});

it('counts a cut file once, however many samples its header claims', async () => {
  // ds64 with a data size of 2^64 - 1 (EBU Tech 3306, 3.3).
  const sizes = new Uint8Array(28).fill(255, 8, 16);
  const data = chunk('data', new Uint8Array([1, 0, 2, 0]), 0xffffffff);
  const body = join(text('WAVE'), chunk('ds64', sizes), formatChunk(), data);
  const { warnings, sampleCount } = await readGood(chunk('RF64', body, 0xffffffff));
  expect(sampleCount).toBe(2);
  expect(warnings).toEqual([expect.objectContaining({ code: 'truncated', count: 1 })]);
});
