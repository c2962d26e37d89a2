import { describe, expect, it } from 'vitest';
import type { ChannelOptions, ImportOptions } from '../src/index.js';
import { fixture, readBad, readGood } from './support.js';
import { chunk, formatChunk, wavFile } from './wav-builder.js';

const codes = [-32768, -16384, 0, 16384, 32767];
const wav = wavFile(formatChunk(), chunk('data', new Uint8Array(Int16Array.from(codes).buffer)));
const table = `t (s),u (mV)\n${codes.map((code, n) => `${n / 1000},${code}`).join('\n')}\n`;
const numpy = fixture('npy-i2-big.npy');
const comtrade = fixture('comtrade-binary.cff');

async function scaled(file: Uint8Array | string, channel: ChannelOptions, rest: ImportOptions = {}) {
  const { channels, samples } = await readGood(file, { ...rest, channels: [channel] });
  const [{ gain, offset, lowestCode, highestCode } = { gain: 0, offset: 0 }] = channels;
  const values = (samples[0] ?? []).map((raw) => raw * gain + offset);
  return { values, gain, offset, lowestCode, highestCode };
}

// Engineering value = raw x gain x full scale x probe ratio x (+-1) + offset, worked out by hand.
describe('scaling of a channel', () => {
  it('takes full scale as the input at the end of the codes of a WAV', async () => {
    const { values, lowestCode, highestCode } = await scaled(wav, { column: 0, fullScale: 10, unit: 'V' });
    expect(values).toEqual([-10, -5, 0, 5, (10 * 32767) / 32768]);
    expect([lowestCode, highestCode]).toEqual([-1, 32767 / 32768]);
  });

  it('multiplies all factors, and adds the offset last', async () => {
    const channel = {
      column: 0,
      gain: 2,
      offset: 3,
      fullScale: 10,
      probeRatio: 100,
      inverted: true,
      unit: 'V',
    };
    const { values } = await scaled(wav, channel);
    expect(values.slice(0, 4)).toEqual([2003, 1003, 3, -997]);
  });

  it('leaves the ends of the codes raw, so that a negative gain swaps what they mean', async () => {
    const { gain, offset, lowestCode, highestCode } = await scaled(wav, { column: 0, inverted: true });
    expect(gain * Number(lowestCode) + offset).toBe(1);
    expect(gain * Number(highestCode) + offset).toBe(-32767 / 32768);
  });

  it('keeps the prefix of a unit in a table', async () => {
    expect(await scaled(table, { column: 'u', probeRatio: 10 })).toMatchObject({ gain: 0.01, offset: 0 });
    const channel = { column: 'u', probeRatio: 10, offset: 5, inverted: true };
    expect((await scaled(table, channel)).values[0]).toBeCloseTo(327.68 + 0.005, 12);
  });

  it('holds for arrays', async () => {
    const rate = { sampleRateHz: 4000 };
    const plain = await scaled(numpy, { column: 0 }, rate);
    const turned = await scaled(numpy, { column: 0, fullScale: 0.5, probeRatio: 4, inverted: true }, rate);
    expect(turned.values).toEqual(plain.values.map((value) => -2 * value));
    expect(turned.highestCode).toBe(32767);
  });

  it('multiplies what a COMTRADE record states, its offset included', async () => {
    // a = 0.002, b = 0.01 kV.
    const turned = await scaled(comtrade, { column: 0, probeRatio: 3, inverted: true });
    expect(turned.gain).toBeCloseTo(-6, 12);
    expect(turned.offset).toBeCloseTo(-30, 12);
    const given = await scaled(comtrade, { column: 0, probeRatio: 3, offset: 0.01, unit: 'kV' });
    expect(given.offset).toBeCloseTo(10, 12);
  });

  it.each([
    [{ fullScale: 0 }, 'full scale 0'],
    [{ fullScale: -5 }, 'full scale -5'],
    [{ probeRatio: Infinity }, 'probe ratio Infinity'],
    [{ probeRatio: NaN }, 'probe ratio NaN'],
    [{ gain: 0 }, 'gain 0'],
    [{ gain: 1e-200, probeRatio: 1e-200 }, 'gain 1e-200'],
    [{ offset: Infinity }, 'offset Infinity'],
  ])('refuses %o by name', async (scaling, what) => {
    const problem = await readBad(wav, { channels: [{ column: 0, ...scaling }] });
    expect(problem.code).toBe('bad-scaling');
    expect(problem.message).toContain(`"ch1": the ${what}`);
  });
});
