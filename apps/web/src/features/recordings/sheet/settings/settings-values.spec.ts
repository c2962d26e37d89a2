import type { Settings } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { settingsFormSchema, toSettings, toSettingsForm } from './settings-values.js';

const view = { fromS: 1, toS: 1.08 };
const plain: Settings = { profile: 'mains', nominalFrequencyHz: 'auto' };

describe('settings of an analysis', () => {
  it('come back as they went in', () => {
    const full: Settings = {
      profile: 'general',
      nominalFrequencyHz: 400,
      maxOrder: 60,
      thdMaxOrder: 20,
      window: 'flat-top',
      span: { fromS: 0.5, toS: 2 },
    };
    for (const settings of [plain, full, { ...plain, nominalFrequencyHz: 60 }] as Settings[]) {
      expect(toSettings(toSettingsForm(settings, view), settings)).toEqual(settings);
    }
  });

  it('offer the part in view as a span', () => {
    const values = { ...toSettingsForm(plain, view), extent: 'part' } as const;
    expect(toSettings(values, plain).span).toEqual(view);
  });

  it('keep the cycles per window only where there are windows', () => {
    const earlier: Settings = { ...plain, cyclesPerWindow: 12 };
    const form = toSettingsForm(earlier, view);
    expect(toSettings(form, earlier).cyclesPerWindow).toBe(12);
    expect(toSettings({ ...form, profile: 'tone' }, earlier)).not.toHaveProperty('cyclesPerWindow', 12);
  });

  it('leave the highest order in THD to the profile where it is its default', () => {
    // Order 40: IEC 61000-3-2, harmonic currents to order 40; ten orders for tones are common practice.
    expect(toSettingsForm({ ...plain, thdMaxOrder: 40 }, view).thdMaxOrder).toBe('');
    expect(toSettingsForm({ ...plain, profile: 'tone', thdMaxOrder: 10 }, view).thdMaxOrder).toBe('');
    expect(toSettingsForm({ ...plain, profile: 'tone', thdMaxOrder: 40 }, view).thdMaxOrder).toBe('40');
  });

  it('name the field that is wrong', () => {
    const fields = (change: object) =>
      settingsFormSchema
        .safeParse({ ...toSettingsForm(plain, view), ...change })
        .error?.issues.map(({ path }) => path[0]);
    expect(fields({ nominal: 'other', nominalOtherHz: '' })).toEqual(['nominalOtherHz']);
    expect(fields({ maxOrder: '1' })).toEqual(['maxOrder']);
    expect(fields({ extent: 'part', fromS: '2', toS: '1' })).toEqual(['toS']);
    expect(fields({ thdMaxOrder: '60' })).toEqual(['thdMaxOrder']);
    expect(fields({ maxOrder: '' })).toBeUndefined();
  });
});
