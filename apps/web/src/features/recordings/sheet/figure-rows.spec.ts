import type { ChannelAnalysis, Settings } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { sampleChannel } from '../../../testing/sample-analyses.js';
import { figureRows } from './figure-rows.js';

const mains: Settings = { profile: 'mains', nominalFrequencyHz: 50 };

const figures = (thdMaxOrder: number, highest: number) => {
  const harmonics = Array.from({ length: highest }, (_, index) => ({ order: index + 1 }));
  const channel = {
    ...{ unit: 'V', quantity: 'voltage', fundamental: null, windows: null, harmonics, thdMaxOrder },
    ...{ thdFPercent: 0.0051, thdRPercent: 5.1, thdPlusNPercent: 6.2, uncertainty: {}, tone: null },
  } as unknown as ChannelAnalysis;
  return new Map(figureRows(channel, mains).map((row) => [row.name, row]));
};

describe('figures of distortion', () => {
  it('name the orders that were counted: those of THD, as far as the record holds them', () => {
    expect(figures(40, 50).get('THD, of the fundamental')?.basis).toBe('THD_F, orders 2 to 40');
    expect(figures(40, 12).get('THD, of the rms')?.basis).toBe('THD_R, orders 2 to 12');
  });

  it('keep their digits where they are small, and say what THD+N refers to', () => {
    expect(figures(40, 50).get('THD, of the fundamental')?.shown).toBe('0.00510\u00a0%');
    expect(figures(40, 50).get('THD+N')?.basis).toContain('of the total AC rms');
  });
});

describe('figures of a channel', () => {
  const budget = (expanded: number) => ({ expanded, coverageFactor: 2, contributors: [] });
  const rowsOf = (change: Partial<ChannelAnalysis>, settings = mains) =>
    new Map(figureRows(sampleChannel(change), settings).map((row) => [row.name, row]));

  it('carry the digits that their uncertainty supports (JCGM 100:2008, 7.2.6)', () => {
    const rms = rowsOf({ rms: 3.20012, uncertainty: { rms: budget(0.0123) } }).get('rms');
    expect(rms?.shown).toBe('3.200\u00a0A');
    expect(rms?.uncertainty?.expanded).toBe(0.0123);
  });

  it('leave out the uncertainty of a frequency that is finer than any clock', () => {
    const row = (expanded: number) =>
      rowsOf({ uncertainty: { 'fundamental.frequencyHz': budget(expanded) } }).get('Fundamental frequency');
    expect(row(0.002)).toMatchObject({ shown: '50.0000\u00a0Hz', uncertainty: { expanded: 0.002 } });
    expect(row(1e-8)).toMatchObject({ shown: '50.0000\u00a0Hz', uncertainty: null });
  });

  it('say that they are of a span where one was analysed', () => {
    const span = { ...mains, span: { fromS: 1, toS: 3 } };
    expect(rowsOf({}, span).get('rms')?.basis).toBe(
      'over 1.00\u00a0s to 3.00\u00a0s of the record, DC included',
    );
    expect(rowsOf({}).get('rms')?.basis).toBe('over the whole record, DC included');
  });

  it('add those of a single tone, and none of them where they do not apply', () => {
    const tone = {
      ...{ levelDbfs: -3.02, enobFullScaleBits: null, noiseDensity: 1.3e-7, thdPlusNBandPercent: 0.0171 },
      ...{ bandHz: { fromHz: 20, toHz: 20_000 }, harmonicsDbc: [] },
    };
    const rows = rowsOf({ unit: 'V', tone });
    expect(rows.get('Noise density')?.shown).toBe('130\u00a0nV/√Hz');
    expect(rows.get('Level')?.shown).toBe('\u22123.02\u00a0dBFS');
    expect(rows.get('THD+N in the band')?.basis).toBe('20\u00a0Hz to 20000\u00a0Hz');
    expect(rows.has('ENOB, full scale')).toBe(false);
  });
});
