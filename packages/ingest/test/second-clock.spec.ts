import { describe, expect, it } from 'vitest';
import { readGood } from './support.js';

const table = (header: string, row: (i: number) => (string | number)[], count = 20) =>
  [header, ...Array.from({ length: count }, (_, i) => row(i).join(','))].join('\n') + '\n';
const wave = (i: number) => ((i * 7) % 11) - 5;

const names = (reading: { channels: { name: string }[] }) => reading.channels.map(({ name }) => name);
const codes = (reading: { warnings: { code: string }[] }) => reading.warnings.map(({ code }) => code);

// What is a clock follows from how each table is made: its columns rise with the time or they do not.
describe('a clock beside the time column', () => {
  const twoClocks = table('timestamp_ms,global_ms,accel', (i) => [3 + i, 2135003 + i, wave(i)]);

  it('is no channel, and a warning names it', async () => {
    const reading = await readGood(twoClocks);
    expect(names(reading)).toEqual(['accel']);
    expect(reading.sampleRateHz).toBeCloseTo(1000, 6);
    expect(reading.warnings).toMatchObject([
      { code: 'second-clock', count: 1, message: expect.stringContaining('"global"') as string },
    ]);
  });

  it('is a channel when the user lists it', async () => {
    const reading = await readGood(twoClocks, { channels: [{ column: 'global_ms' }, { column: 2 }] });
    expect(names(reading)).toEqual(['global', 'accel']);
    expect(reading.samples[0]?.[1]).toBe(2135004);
    expect(codes(reading)).not.toContain('second-clock');
  });

  it('is known without a unit by its pace, in seconds against milliseconds', async () => {
    const reading = await readGood(table('time_s,tick,u_V', (i) => [i / 50, 4000 + i * 20, wave(i)]));
    expect(names(reading)).toEqual(['u']);
  });

  it('is known beside calendar stamps by its unit', async () => {
    const stamp = (i: number) => `2024-03-21 10:00:00.${String(i * 10).padStart(3, '0')}`;
    const reading = await readGood(table('Date,elapsed_s,u_V', (i) => [stamp(i), i / 100, wave(i)]));
    expect(names(reading)).toEqual(['u']);
  });

  it.each([
    ['a ramp with a unit', 'time_s,u_V', (i: number) => [i, 5 + i]],
    ['a ramp of another pace', 'time_s,ramp,u_V', (i: number) => [i, 5 + 3 * i, wave(i)]],
    ['a time that does not rise in step', 'time_s,loop_us,u_V', (i: number) => [i, 2400 + wave(i), wave(i)]],
    ['a time that rises faster and faster', 'time_s,delay_us,u_V', (i: number) => [i, i * i, wave(i)]],
    ['a time that stands still now and then', 'time_s,tick_s,u_V', (i: number) => [i, i >> 1, wave(i)]],
  ])('is not seen in %s', async (_what, header, row) => {
    const reading = await readGood(table(header, row));
    expect(reading.channels).toHaveLength(header.split(',').length - 1);
    expect(codes(reading)).not.toContain('second-clock');
  });
});
