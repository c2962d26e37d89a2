import { describe, expect, it } from 'vitest';
import { joinComtradePair } from '../src/index.js';
import { fixture, readBad, readGood } from './support.js';
import { join } from './wav-builder.js';

// The values that the layout of the standard gives: fixtures/readers/make-comtrade.py.
const { cases } = JSON.parse(new TextDecoder().decode(fixture('comtrade-cases.json'))) as {
  cases: { file: string; values: (number | null)[][] }[];
};
const values = cases.find(({ file }) => file === 'comtrade-binary.cff')?.values ?? [];

function joined(name: string, headBytes?: number) {
  const [cfg, dat] = [fixture(`${name}.cfg`), fixture(`${name}.dat`)];
  const head = cfg.subarray(0, headBytes);
  const { fileName, beforeCfg, beforeDat } = joinComtradePair(
    { name: `${name}.CFG`, head },
    { name: `${name}.DAT`, sizeBytes: dat.length },
  );
  return { fileName, bytes: join(beforeCfg, cfg, beforeDat, dat) };
}

describe('two files of a COMTRADE record joined to one', () => {
  it.each([
    ['comtrade-pair-1991', '1994-06-25T19:13:57.789757'],
    ['comtrade-pair-1999', '2024-06-25T19:13:57.789757'],
  ])('%s reads as the values of its layout', async (name, startTime) => {
    const { fileName, bytes } = joined(name);
    const reading = await readGood(bytes, {}, fileName);
    expect(fileName).toBe(`${name}.cff`);
    expect(reading).toMatchObject({ format: 'comtrade', sampleRateHz: 4800, sampleCount: 96 });
    expect(reading).toMatchObject({ missingValues: [1, 0, 1], metadata: { startTime } });
    for (const [c, { gain, offset }] of reading.channels.entries()) {
      for (const [n, wanted] of (values[c] as (number | null)[]).entries()) {
        const raw = reading.samples[c]?.[n] as number;
        if (wanted === null) expect(raw).toBeNaN();
        else expect(gain * raw + offset).toBeCloseTo(wanted, 9);
      }
    }
    expect(reading.warnings.map(({ code }) => code)).not.toContain('truncated');
  });

  it('keeps the line end of the configuration, and states the size of binary data', () => {
    const parts = joinComtradePair(
      { name: 'a.cfg', head: fixture('comtrade-pair-1999.cfg') },
      { name: 'a.dat', sizeBytes: 1776 },
    );
    const text = (bytes: Uint8Array) => new TextDecoder().decode(bytes);
    expect(text(parts.beforeCfg)).toBe('--- file type: CFG ---\n');
    expect(text(parts.beforeDat)).toBe('\n--- file type: DAT BINARY: 1776 ---\n');
    expect(text(joined('comtrade-pair-1991').bytes)).toContain('\r\n--- file type: DAT ASCII ---\r\n');
  });

  it('refuses a configuration without type of data, and data without bytes', () => {
    const refusal = expect.objectContaining({ problem: expect.objectContaining({ code: 'no-data-type' }) });
    expect(() => joined('comtrade-pair-1999', 200)).toThrow(refusal as Error);
    const head = fixture('comtrade-pair-1999.cfg');
    expect(() => joinComtradePair({ name: 'a.cfg', head }, { name: 'a.dat', sizeBytes: 0 })).toThrow(/empty/);
  });

  it('lets the reader refuse halves that do not belong together', async () => {
    const head = fixture('comtrade-pair-1991.cfg');
    const dat = new TextEncoder().encode('1,0,5\r\n2,208,6\r\n');
    const parts = joinComtradePair({ name: 'a.cfg', head }, { name: 'a.dat', sizeBytes: dat.length });
    const problem = await readBad(join(parts.beforeCfg, head, parts.beforeDat, dat), {}, parts.fileName);
    expect(problem).toMatchObject({ code: 'wrong-field-count', line: 31 });
  });
});
