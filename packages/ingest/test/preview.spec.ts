import { describe, expect, it } from 'vitest';
import { previewRecording } from '../src/index.js';
import { fixture, readAll } from './support.js';

const preview = (name: string, sizeBytes?: number) =>
  previewRecording(fixture(name), { fileName: name, sizeBytes: sizeBytes ?? fixture(name).length });

describe('preview', () => {
  it('shows lines, rows and layout of a table', async () => {
    const shown = await preview('F9-P03.csv');
    expect(shown.layout).toMatchObject({
      delimiter: ';',
      decimal: ',',
      headerRows: 1,
      timeColumn: 0,
      confident: true,
    });
    expect(shown.lines).toHaveLength(30);
    expect(shown.lines[1]).toBe('0;2,434269;1,300214');
    expect(shown.rows).toHaveLength(20);
    expect(shown.rows[1]).toEqual([0.00025, 4.145453, 1.469653]);
    expect(shown.sampleRateHz).toBeCloseTo(4000, 3);
    expect(shown).toMatchObject({ problem: null, needs: [] });
  });

  it('keeps words and blanks apart from numbers', async () => {
    const text = 't,u,i\n0,1,\n0.1,overload,2\n0.2,3,4\n';
    const bytes = new TextEncoder().encode(text);
    const { rows } = await previewRecording(bytes, { fileName: 'a.csv', sizeBytes: bytes.length });
    expect(rows).toEqual([
      [0, 1, null],
      [0.1, 'overload', 2],
      [0.2, 3, 4],
    ]);
  });

  it('has the rate from calendar stamps too', async () => {
    const rows = [0, 1, 2, 3].map((i) => `2024-03-21 10:00:00.00${i},${i}`);
    const bytes = new TextEncoder().encode(`Date,u_V\n${rows.join('\n')}\nEnd of record\n`);
    const shown = await previewRecording(bytes, { fileName: 'a.csv', sizeBytes: bytes.length });
    expect(shown.sampleRateHz).toBeCloseTo(1000, 6);
  });

  it('asks for the sample rate and still shows the rows', async () => {
    const shown = await preview('F9-P30.csv');
    expect(shown.needs).toEqual(['sampleRateHz']);
    expect(shown.problem?.code).toBe('needs-sample-rate');
    expect(shown.rows[0]).toEqual([0.003449, -0.758644]);
    const given = await previewRecording(fixture('F9-P30.csv'), {
      fileName: 'a.csv',
      options: { sampleRateHz: 4000 },
    });
    expect(given).toMatchObject({ needs: [], problem: null, sampleRateHz: 4000 });
  });

  it('shows the first frames of a WAV file', async () => {
    const shown = await preview('F9-P41.wav');
    expect(shown).toMatchObject({ sampleRateHz: 8000, lines: [], needs: [], problem: null });
    expect(shown.layout).toMatchObject({ format: 'wav', bitsPerSample: 32, sampleFormat: 'float' });
    expect(shown.rows[0]?.[0]).toBeCloseTo(0.384941488504, 9);
  });

  it.each(['F9-P31.csv', 'F9-P34.csv', 'F9-P35.csv', 'F9-P55.wav', 'F9-P60.wav'])(
    'tells the problem of %s',
    async (name) => {
      expect((await preview(name)).problem).not.toBeNull();
    },
  );

  it('leaves out the last line of a cut head, and agrees with the reader', async () => {
    const name = 'F9-P01.csv';
    const shown = await previewRecording(fixture(name).subarray(0, 500), { fileName: name, sizeBytes: 5932 });
    const { outcome } = await readAll(fixture(name), {}, name);
    expect(shown.sampleRateHz).toBeCloseTo(4000, 6);
    expect(outcome).toMatchObject({ layout: shown.layout });
  });
});
