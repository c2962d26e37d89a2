import { describe, expect, it } from 'vitest';
import { sampleChannel, sampleHarmonic } from '../../../../testing/sample-analyses.js';
import {
  choiceTitle,
  figureOptions,
  fitted,
  followOrder,
  statisticsOf,
  type SeriesChoice,
} from './series-choice.js';

const statistics = { mean: 1, max: 2, p95: 1.5, p99: 1.8 };
const channel = sampleChannel({
  harmonics: [sampleHarmonic(1, 2), sampleHarmonic(5, 0.4, { groupStatistics: statistics })],
  interharmonics: [{ betweenOrders: [0, 1], groupRms: 0.01, centredSubgroupRms: 0.01 }],
  distortion: { thd: statistics, thdg: null, thds: null, pwhd: null },
});
const rms: SeriesChoice = { figure: 'rms', order: 1, aggregation: '3s' };

describe('what is followed over time', () => {
  it('is offered where the channel holds it', () => {
    expect(figureOptions(channel).map(({ value }) => value)).toEqual([
      ...['rms', 'frequency', 'thd', 'line', 'group', 'subgroup', 'interharmonicGroup', 'centredSubgroup'],
    ]);
  });

  it('follows an order by its group for a current and its subgroup for anything else', () => {
    expect(followOrder(channel, 5, rms)).toEqual({ figure: 'group', order: 5, aggregation: '3s' });
    expect(followOrder({ ...channel, quantity: 'voltage' }, 5, rms).figure).toBe('subgroup');
    expect(followOrder(channel, 5, { ...rms, figure: 'line' }).figure).toBe('line');
  });

  it('falls back to what the channel holds', () => {
    expect(fitted({ ...rms, figure: 'band', order: 3 }, channel)).toMatchObject({ figure: 'rms' });
    expect(fitted({ ...rms, figure: 'group', order: 7 }, channel)).toMatchObject({
      figure: 'group',
      order: 1,
    });
    expect(fitted({ ...rms, figure: 'interharmonicGroup', order: 5 }, channel)).toMatchObject({ order: 0 });
  });

  it('is named with its order, and comes with the statistics that belong to it', () => {
    const group: SeriesChoice = { ...rms, figure: 'group', order: 5 };
    expect(choiceTitle(group, channel)).toBe('order 5, group');
    expect(statisticsOf(group, channel)).toEqual(statistics);
    expect(statisticsOf({ ...group, order: 1 }, channel)).toBeNull();
    expect(statisticsOf({ ...rms, figure: 'thd' }, channel)).toEqual(statistics);
    expect(statisticsOf({ ...rms, figure: 'thdg' }, channel)).toBeNull();
  });
});
