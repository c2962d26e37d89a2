import { testConditionsSchema, type Equipment } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { sampleId, sampleRecording } from '../../../testing/samples.js';
import { benchSchema, emptyBench, fromBench, stillOffered, toBench } from './bench-values.js';

describe('what is said of the bench', () => {
  it('goes to the server and comes back as it was, a decimal comma included', () => {
    const values = { ...emptyBench, ambientTemperatureC: '23,5', supply: ' power source ' };
    const { conditions } = fromBench(values);
    expect(testConditionsSchema.parse(conditions)).toEqual({
      ambientTemperatureC: 23.5,
      supply: 'power source',
    });
    expect(toBench(sampleRecording({ conditions }))).toMatchObject({
      ...{ ambientTemperatureC: '23.5', supply: 'power source', place: '', equipmentId: '' },
    });
  });

  it('refuses numbers that cannot be', () => {
    const fault = (change: object) =>
      benchSchema.safeParse({ ...emptyBench, ...change }).error?.issues[0]?.path.join('.');
    expect(fault({})).toBeUndefined();
    expect(fault({ relativeHumidityPercent: '101' })).toBe('relativeHumidityPercent');
    expect(fault({ supplyVoltageV: '0' })).toBe('supplyVoltageV');
    expect(fault({ ambientTemperatureC: 'warm' })).toBe('ambientTemperatureC');
  });

  it('names no mode without its equipment, and nothing that was retired since', () => {
    const kept = { ...emptyBench, equipmentId: sampleId(1), operatingModeId: sampleId(2) };
    expect(fromBench({ ...kept, equipmentId: '' }).operatingModeId).toBeNull();
    const mode = { id: sampleId(2), name: 'On', description: '', recordings: 0 };
    const piece = (retired: boolean, retiredAt: string | null) =>
      ({ id: sampleId(1), retiredAt, operatingModes: [{ ...mode, retired }] }) as unknown as Equipment;
    expect(stillOffered(kept, [piece(false, null)], [])).toEqual(kept);
    expect(stillOffered(kept, [piece(true, null)], []).operatingModeId).toBe('');
    expect(stillOffered(kept, [piece(false, '2026-11-26T13:20:00Z')], [])).toEqual(emptyBench);
  });
});
