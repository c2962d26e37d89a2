import { describe, expect, it } from 'vitest';
import { readRecording } from '../src/index.js';
import { fixture, inChunks, readAll } from './support.js';

const sink = { begin: () => undefined, write: () => undefined };

describe('streaming', { timeout: 30_000 }, () => {
  it.each([
    'F9-P03.csv',
    'F9-P11.csv',
    'F9-P18.csv',
    'F9-P19.csv',
    'F9-P25.csv',
    'F9-P29.csv',
    'F9-P39.wav',
    'F9-P49.wav',
  ])('gives the same for %s whatever the size of the chunks', async (name) => {
    const whole = await readAll(fixture(name), {}, name, 1 << 20);
    for (const size of [1, 7, 4096]) expect(await readAll(fixture(name), {}, name, size)).toEqual(whole);
  });

  it('joins lines and CRLF across its own windows', async () => {
    const count = 60000;
    const rows = Array.from({ length: count }, (_, i) => `${(i / 1000).toFixed(3)},${i}`);
    const { outcome, samples } = await readAll(`t,u\r\n${rows.join('\r\n')}\r\n`, {}, 'long.csv', 10007);
    expect(outcome).toMatchObject({ ok: true, sampleCount: count, warnings: [] });
    expect(samples[0]).toEqual(Array.from({ length: count }, (_, i) => i));
  });

  it('counts a CRLF that its window cuts in two as one line end', async () => {
    const rows = Array.from({ length: 30000 }, (_, i) => `${(i / 1000).toFixed(3).padStart(6, '0')},${i}`);
    const end = '\r\n99.000,lost\r\n';
    const text = `t,u\r\n${rows.join('\r\n')}${end}`;
    const cut = text.lastIndexOf('\r', 2 ** 18);
    const padded = `t,u${' '.repeat(2 ** 18 - 1 - cut)}${text.slice(3)}`;
    expect(padded[2 ** 18 - 1]).toBe('\r');
    const { outcome } = await readAll(padded, {}, 'long.csv');
    const missing = { code: 'missing-values', count: 1, firstLine: 30002 };
    expect(outcome).toMatchObject({ ok: true, warnings: [missing, { code: 'gap' }] });
  });

  it('does not run ahead of a slow sink and hands out blocks of bounded size', async () => {
    let largest = 0;
    let busy = false;
    const rows = Array.from({ length: 50000 }, (_, i) => `${i / 1000},${i}`);
    await readRecording(inChunks(new TextEncoder().encode(`t,u\n${rows.join('\n')}\n`)), {
      fileName: 'long.csv',
      sink: {
        begin: () => undefined,
        write: async (_index, samples) => {
          expect(busy).toBe(false);
          busy = true;
          largest = Math.max(largest, samples.length);
          await Promise.resolve();
          busy = false;
        },
      },
    });
    expect(largest).toBeLessThanOrEqual(16384);
  });

  it('reports the bytes read', async () => {
    const seen: number[] = [];
    const bytes = fixture('F9-P01.csv');
    await readRecording(inChunks(bytes, 1000), { fileName: 'a.csv', sink, onProgress: (n) => seen.push(n) });
    expect(seen[0]).toBe(1000);
    expect(seen.at(-1)).toBe(bytes.length);
  });

  it('stops with the reason of the abort signal', async () => {
    const abort = new AbortController();
    const reading = readRecording(inChunks(fixture('F9-P24.csv'), 100), {
      fileName: 'a.csv',
      sink,
      signal: abort.signal,
      onProgress: (n) => n > 5000 && abort.abort(new Error('cancelled by the user')),
    });
    await expect(reading).rejects.toThrow('cancelled by the user');
  });

  it('passes on what the source and the sink throw', async () => {
    const write = () => Promise.reject(new Error('disk full'));
    const bytes = inChunks(fixture('F9-P01.csv'));
    await expect(readRecording(bytes, { fileName: 'a.csv', sink: { ...sink, write } })).rejects.toThrow(
      'disk full',
    );
  });

  it('lets the source go when it refuses early', async () => {
    let returned = false;
    const source: AsyncIterable<Uint8Array> = {
      [Symbol.asyncIterator]: () => ({
        next: () => Promise.resolve({ done: false, value: new TextEncoder().encode('%PDF-1.7 and so on') }),
        return: () => {
          returned = true;
          return Promise.resolve({ done: true, value: undefined });
        },
      }),
    };
    expect(await readRecording(source, { fileName: 'a.csv', sink })).toMatchObject({ ok: false });
    expect(returned).toBe(true);
  });
});
