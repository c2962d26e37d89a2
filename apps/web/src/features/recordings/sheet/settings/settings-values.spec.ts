import type { Settings } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { settingsFormSchema } from './settings-form.js';
import { toSettings, toSettingsForm } from './settings-values.js';

const view = { fromS: 1, toS: 1.08 };
const plain: Settings = { profile: 'mains', nominalFrequencyHz: 'auto' };
const channels = [
  { index: 0, name: 'u1', quantity: 'voltage', unit: 'V' },
  { index: 1, name: 'i1', quantity: 'current', unit: 'A' },
] as const;
const formOf = (settings: Settings) => toSettingsForm(settings, view, channels);

describe('settings of an analysis', () => {
  it('come back as they went in', () => {
    const full: Settings = {
      profile: 'general',
      nominalFrequencyHz: 400,
      maxOrder: 60,
      thdMaxOrder: 20,
      window: 'kaiser',
      kaiserBeta: 12,
      segmentLength: 8192,
      overlapPercent: 75,
      pairs: [{ voltage: 0, current: 1, phase: 1 }],
      threePhase: [],
      ratedCurrentA: 16,
      accuracy: [{ channel: 1, readingPercent: 0.5, calibrationPercent: 0 }],
      span: { fromS: 0.5, toS: 2 },
    };
    const tone: Settings = { profile: 'tone', nominalFrequencyHz: 997, bandHz: { fromHz: 20, toHz: 20_000 } };
    for (const settings of [plain, full, tone, { ...plain, nominalFrequencyHz: 60 }] as Settings[]) {
      expect(toSettings(formOf(settings))).toEqual(settings);
    }
  });

  it('offer the part in view as a span', () => {
    const values = { ...formOf(plain), extent: 'part' } as const;
    expect(toSettings(values).span).toEqual(view);
  });

  it('keep the cycles per window only where there are windows', () => {
    const earlier: Settings = { ...plain, cyclesPerWindow: 12 };
    const form = formOf(earlier);
    expect(toSettings(form).cyclesPerWindow).toBe(12);
    expect(toSettings({ ...form, profile: 'tone' })).not.toHaveProperty('cyclesPerWindow', 12);
  });

  it('leave the highest order in THD to the profile where it is its default', () => {
    // Order 40: IEC 61000-3-2, harmonic currents to order 40; ten orders for tones are common practice.
    expect(formOf({ ...plain, thdMaxOrder: 40 }).thdMaxOrder).toBe('');
    expect(formOf({ ...plain, profile: 'tone', thdMaxOrder: 10 }).thdMaxOrder).toBe('');
    expect(formOf({ ...plain, profile: 'tone', thdMaxOrder: 40 }).thdMaxOrder).toBe('40');
  });

  it('name the field that is wrong', () => {
    const fields = (change: object) =>
      settingsFormSchema.safeParse({ ...formOf(plain), ...change }).error?.issues.map(({ path }) => path[0]);
    expect(fields({ nominal: 'other', nominalOtherHz: '' })).toEqual(['nominalOtherHz']);
    expect(fields({ maxOrder: '1' })).toEqual(['maxOrder']);
    expect(fields({ extent: 'part', fromS: '2', toS: '1' })).toEqual(['toS']);
    expect(fields({ thdMaxOrder: '60' })).toEqual(['thdMaxOrder']);
    expect(fields({ maxOrder: '' })).toBeUndefined();
  });

  it('propose the pairs that the names of the channels tell, and send none while the proposal stands', () => {
    const form = formOf(plain);
    expect(form).toMatchObject({ pairing: 'proposed', pairs: [{ voltage: '0', current: '1' }] });
    expect(toSettings(form)).not.toHaveProperty('pairs', expect.anything());
    expect(toSettings({ ...form, pairing: 'chosen', pairs: [] }).pairs).toEqual([]);
  });

  it('keep what only one profile uses out of the others', () => {
    const form = { ...formOf(plain), bandFromHz: '20', bandToHz: '20000', segmentLength: '4096' };
    expect(toSettings(form)).not.toHaveProperty('bandHz', expect.anything());
    expect(toSettings({ ...form, profile: 'tone' }).bandHz).toEqual({ fromHz: 20, toHz: 20_000 });
    expect(toSettings({ ...form, profile: 'general' })).toMatchObject({ segmentLength: 4096 });
  });

  it('send the accuracy of those channels alone of which something is stated, with a decimal comma too', () => {
    const form = formOf(plain);
    form.accuracy[1] = { ...form.accuracy[1]!, calibrationPercent: '0,25' };
    expect(toSettings(form).accuracy).toEqual([{ channel: 1, readingPercent: 0, calibrationPercent: 0.25 }]);
  });

  it('name a pair, a set of phases or a band that is not complete', () => {
    const paths = (change: object) =>
      settingsFormSchema
        .safeParse({ ...formOf(plain), pairing: 'chosen', ...change })
        .error?.issues.map(({ path }) => path.join('.'));
    expect(paths({ pairs: [{ voltage: '', current: '1', phase: '' }] })).toEqual(['pairs.0.voltage']);
    const set = { voltages: ['0', '0', '2'], currents: ['3', '4', '5'], wires: '4w' };
    expect(paths({ sets: [set] })).toEqual(['sets.0.wires']);
    expect(paths({ profile: 'tone', bandFromHz: '20' })).toEqual(['bandToHz']);
    expect(paths({ profile: 'tone', bandFromHz: '20', bandToHz: '10' })).toEqual(['bandToHz']);
  });
});
