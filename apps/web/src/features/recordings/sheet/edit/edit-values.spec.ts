import type { Recording } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { editSchema, toEditValues, toUpdate } from './edit-values.js';

const recording = {
  name: 'Bench dimmer',
  eut: 'DM-4',
  measuringChain: 'CT-07',
  instrument: '',
  remark: '',
  capturedAt: '2026-11-26T13:20:00.250Z',
  equipment: null,
  operatingMode: null,
  chain: null,
  conditions: {},
  channels: [
    { index: 0, name: 'u', quantity: 'voltage', unit: 'V', gain: 1, offset: 0 },
    { index: 1, name: 'i', quantity: 'current', unit: 'A', gain: 10, offset: 0 },
  ],
} as unknown as Recording;

describe('editing a recording', () => {
  it('sends no channels and no moment when neither was touched, since a change of channels analyses anew', () => {
    const update = toUpdate(toEditValues(recording), recording);
    expect(update).not.toHaveProperty('channels');
    expect(update).not.toHaveProperty('capturedAt');
  });

  it('sends of a channel only what was changed, and takes a decimal comma', () => {
    const values = toEditValues(recording);
    values.channels[1] = { ...values.channels[1]!, gain: '12,5' };
    expect(toUpdate(values, recording).channels).toEqual([{ index: 1, gain: 12.5 }]);
  });

  it('leaves the text of the equipment to the server when other equipment is chosen, unless it was changed', () => {
    const values = toEditValues(recording);
    const other = { ...values, bench: { ...values.bench, equipmentId: 'e1' } };
    expect(toUpdate(other, recording)).not.toHaveProperty('eut');
    expect(toUpdate({ ...other, eut: 'Sample 3' }, recording)).toMatchObject({
      equipmentId: 'e1',
      eut: 'Sample 3',
    });
    expect(toUpdate(values, recording)).toMatchObject({ equipmentId: null, eut: 'DM-4' });
  });

  it('turns the local time of the field into UTC, and an empty one into none', () => {
    const values = { ...toEditValues(recording), capturedAt: '2026-11-27T08:00:00' };
    expect(toUpdate(values, recording).capturedAt).toBe(new Date(2026, 10, 27, 8).toISOString());
    expect(toUpdate({ ...values, capturedAt: '' }, recording).capturedAt).toBeNull();
  });

  it('refuses a gain that is no number or leaves nothing', () => {
    const gain = (text: string) => {
      const values = toEditValues(recording);
      values.channels[0] = { ...values.channels[0]!, gain: text };
      return editSchema.safeParse(values).error?.issues.map(({ path }) => path.join('.'));
    };
    expect(gain('ten')).toContain('channels.0.gain');
    expect(gain('0')).toContain('channels.0.gain');
    expect(gain('-1')).toBeUndefined();
  });
});
