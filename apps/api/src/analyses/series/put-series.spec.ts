import type { SeriesFigure } from '@overtally/contracts';
import type { WindowSeries } from '@overtally/dsp';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect, it } from 'vitest';
import { DiskStorage } from '../../storage/disk-storage.js';
import { putSeries } from './put-series.js';
import { placeOf } from './series-layout.js';
import { readRow } from './stored-series.js';

const count = 3;

/** Rows of values that tell figure, row and window: 100 · figure + 10 · row + window. */
const rows = (figure: number, rowCount: number) =>
  Float64Array.from(
    { length: rowCount * count },
    (_, at) => 100 * figure + 10 * Math.floor(at / count) + (at % count),
  );

const series: WindowSeries = {
  ...{ count, intervalS: 0.2, orders: 4, bandCentresHz: Float64Array.of(2100, 2300) },
  ...{ startS: Float64Array.of(0, 0.2, 0.4), flagged: Uint8Array.of(0, 1, 0) },
  ...{ frequencyHz: rows(1, 1), rms: rows(2, 1), thd: rows(3, 1), thdg: rows(4, 1), thds: rows(5, 1) },
  ...{ pwhd: rows(6, 1), line: rows(7, 4), group: rows(8, 4), subgroup: rows(9, 4), phaseDeg: rows(10, 4) },
  ...{ interharmonicGroup: rows(11, 5), centredSubgroup: rows(12, 5), band: rows(13, 2) },
};

it('stores every figure where it is read again', async () => {
  const folder = await mkdtemp(join(tmpdir(), 'series-'));
  try {
    const storage = new DiskStorage(folder);
    const shape = await putSeries(storage, 'series.npy', series);
    expect(shape).toEqual({
      ...{ count, intervalS: 0.2, orders: 4, interharmonics: 5, bandCentresHz: [2100, 2300] },
    });
    const stored = { key: 'series.npy', shape };
    const numbers: Record<SeriesFigure, number> = {
      ...{ frequency: 1, rms: 2, thd: 3, thdg: 4, thds: 5, pwhd: 6, line: 7, group: 8, subgroup: 9 },
      ...{ interharmonicGroup: 11, centredSubgroup: 12, band: 13 },
    };
    for (const [figure, number] of Object.entries(numbers) as [SeriesFigure, number][]) {
      const last = placeOf(shape, figure).rows - 1;
      const values = await readRow(storage, stored, figure, last);
      expect([...values], figure).toEqual([0, 1, 2].map((window) => 100 * number + 10 * last + window));
    }
    expect([...(await readRow(storage, stored, 'flagged', 0))]).toEqual([0, 1, 0]);
    expect([...(await readRow(storage, stored, 'start', 0, [1, 3]))]).toEqual([0.2, 0.4]);
  } finally {
    await rm(folder, { recursive: true });
  }
});
