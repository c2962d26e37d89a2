import type { ChannelSummary } from '@overtally/contracts';
import { findPublishedLimitSet } from '@overtally/limits';
import { describe, expect, it } from 'vitest';
import { ceilingFor, setsFor } from './ceiling.js';
import type { OverlaySeries } from './series.js';

const classA = findPublishedLimitSet('iec61000-3-2.classA')!;
const classD = findPublishedLimitSet('iec61000-3-2.classD')!;
const supply = findPublishedLimitSet('en50160.lv')!;

function series(quantity: ChannelSummary['quantity'], unit: string, fundamental: number): OverlaySeries {
  const summary: ChannelSummary = {
    channel: 0,
    name: quantity,
    quantity,
    unit,
    fundamentalHz: 50,
    rms: fundamental,
    thdFPercent: 0,
    harmonicRms: [fundamental, 0, 0],
  };
  return { key: '', style: 0, recordingId: '', analysisId: '', label: '', name: '', summary };
}
const at = (order: number, { limits }: { limits: { order: number; limit: number }[] }) =>
  limits.find((entry) => entry.order === order)?.limit;

describe('one ceiling over several channels', () => {
  // IEC 61000-3-2, Table 1: 2.30 A at order 3. EN 50160:2010, Table 1: 5 % at order 3.
  const currents = [series('current', 'A', 4), series('current', 'A', 2)];
  const voltages = [series('voltage', 'V', 230), series('voltage', 'V', 110)];

  it('holds for all where the axis has the unit of the limits', () => {
    expect(at(3, ceilingFor(classA, currents, 'absolute'))).toBeCloseTo(2.3, 12);
    expect(at(3, ceilingFor(supply, voltages, 'relative'))).toBeCloseTo(5, 12);
  });

  it('is refused in words where it would differ from channel to channel', () => {
    expect(ceilingFor(classA, currents, 'relative')).toMatchObject({ limits: [] });
    expect(ceilingFor(classA, currents, 'relative').gap).toContain('switch to absolute');
    expect(ceilingFor(supply, voltages, 'absolute').gap).toContain('switch to relative');
    expect(ceilingFor(classD, currents, 'absolute').gap).toContain('own sheets');
  });

  it('is drawn either way over a single channel: 2.30 A of 4 A is 57.5 %', () => {
    expect(at(3, ceilingFor(classA, currents.slice(0, 1), 'relative'))).toBeCloseTo(57.5, 9);
    expect(at(3, ceilingFor(supply, voltages.slice(0, 1), 'absolute'))).toBeCloseTo(11.5, 9);
  });

  it('comes from sets of the common quantity', () => {
    const sets = [classA, supply];
    expect(setsFor(currents, sets)).toEqual([classA]);
    expect(setsFor([...currents, ...voltages], sets)).toEqual([]);
  });
});
